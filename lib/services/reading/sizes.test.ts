import { describe, expect, it } from 'vitest';
import { maxBytesOf } from './sniff';

const MEGABYTE = 1024 * 1024;

describe('the largest files that are taken', () => {
  it('are 20 MB for PDF and pictures and 5 MB for data', () => {
    expect((['pdf', 'jpeg', 'png'] as const).map((kind) => maxBytesOf(kind) / MEGABYTE)).toEqual([20, 20, 20]);
    expect((['csv', 'text', 'xml', 'json', 'xlsx', 'xls'] as const).map((kind) => maxBytesOf(kind) / MEGABYTE)).toEqual(
      [5, 5, 5, 5, 5, 5],
    );
  });
});
