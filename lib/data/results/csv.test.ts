import Papa from 'papaparse';
import { describe, expect, it } from 'vitest';
import { csvCell, toCsv } from './csv';

describe('a cell of the data file', () => {
  it.each([
    ['=1+1', `'=1+1`],
    ['+1 plot', `'+1 plot`],
    ['-lead', `'-lead`],
    ['@x', `'@x`],
    ['\tx', `'\tx`],
    ['\rx', `"'\rx"`],
    ['-1.5', '-1.5'],
    ['6.30', '6.30'],
    ['<0.1', '<0.1'],
    ['North "long" bed, wet', '"North ""long"" bed, wet"'],
    [null, ''],
    [-2, '-2'],
  ])('%j', (value, cell) => {
    expect(csvCell(value)).toBe(cell);
  });

  it('comes back as it went, read by another program', () => {
    const rows = [
      ['plot', 'value'],
      ['two\nlines, "quoted"', '-1.5'],
      ['', '<0.1'],
    ];
    const parsed = Papa.parse<string[]>(toCsv(rows).slice(1), { skipEmptyLines: true });
    expect(parsed.errors).toEqual([]);
    expect(parsed.data).toEqual(rows);
    expect(toCsv(rows).startsWith('\ufeff')).toBe(true);
  });
});
