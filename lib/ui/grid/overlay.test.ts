import { describe, expect, it } from 'vitest';
import { cellKey, type Overlay, settle, withEdits, withOutcome } from './overlay';
import type { GridEdit, GridRow } from './types';
import { OwnVersions } from './versions';

const row = (ph: string, version = 1): GridRow => ({ id: 'r', version, cells: { ph } });
const edit = (value: string): GridEdit => ({ rowId: 'r', columnId: 'ph', value, before: '6.0', version: 1 });
const key = cellKey('r', 'ph');
const empty: Overlay = new Map();
const typed = (value: string) => withEdits(empty, [edit(value)], () => row('6.0'), { kind: 'saving' });

describe('overlay', () => {
  it('keeps a saved value until the server has caught up', () => {
    const saved = withOutcome(typed('6.4'), [edit('6.4')], []);
    expect(saved.get(key)?.state.kind).toBe('saved');
    expect(settle(saved, () => row('6.0')).get(key)?.value).toBe('6.4');
    expect(settle(saved, () => row('6.4', 2)).size).toBe(0);
  });

  it('lets the server tidy a value back to what it was', () => {
    const saved = withOutcome(typed('6.00'), [edit('6.00')], []);
    expect(settle(saved, () => row('6.0', 2)).size).toBe(0);
  });

  it('does not let new server rows overwrite what is unsaved', () => {
    expect(settle(typed('6.4'), () => row('7.7', 5)).get(key)?.value).toBe('6.4');
    const refused = withOutcome(
      typed('6.4'),
      [edit('6.4')],
      [{ rowId: 'r', columnId: 'ph', state: { kind: 'error', sentence: 'The network did not answer.' } }],
    );
    expect(settle(refused, () => row('7.7', 5)).get(key)?.value).toBe('6.4');
  });

  it('an answer to an older edit does not touch a newer one', () => {
    const newer = withEdits(typed('6.4'), [edit('6.5')], () => row('6.0'), { kind: 'saving' });
    expect(withOutcome(newer, [edit('6.4')], []).get(key)?.state.kind).toBe('saving');
  });
});

describe('own versions', () => {
  it('follow the own saves and nobody else', () => {
    const versions = new OwnVersions();
    versions.saved('r', 3, 4);
    versions.saved('r', 4, 5);
    expect(versions.follow('r', 3)).toBe(5);
    expect(versions.follow('r', 6)).toBe(6);
    expect(versions.follow('other', 3)).toBe(3);
    expect(versions.follow('r', null)).toBeNull();
  });
});
