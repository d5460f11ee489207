import { describe, expect, it } from 'vitest';
import { repeatedGroups } from './repeated';

const groups = (...columns: string[]) => repeatedGroups(columns, (column) => column);

describe('repeatedGroups', () => {
  it('finds groups that say the same, whatever their case', () => {
    expect(groups('Found', 'Target', 'found', 'target')).toEqual([
      ['Found', 'Target'],
      ['found', 'target'],
    ]);
  });
  it('leaves a column without a partner out, before the groups and between them', () => {
    expect(groups('Unit', 'found', 'target', 'Method', 'found', 'target')).toEqual([
      ['found', 'target'],
      ['found', 'target'],
    ]);
  });
  it('finds none where one word comes again and again, where nothing does, or where columns say nothing', () => {
    expect(groups('ppm', 'ppm', 'ppm')).toEqual([]);
    expect(groups('found', 'target', 'rating')).toEqual([]);
    expect(groups('', '', '', '')).toEqual([]);
  });
});
