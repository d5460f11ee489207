import { describe, expect, it } from 'vitest';
import { formatTsv, parseDelimited, parseTsv } from './delimited';

describe('parseTsv', () => {
  it('reads tabs between cells and line breaks of every kind between rows', () => {
    expect(parseTsv('6.4\tpH\n41\tppm')).toEqual([
      ['6.4', 'pH'],
      ['41', 'ppm'],
    ]);
    expect(parseTsv('1\r\n2\r3\n4')).toEqual([['1'], ['2'], ['3'], ['4']]);
  });

  it('takes the last line break as the end of the last row, as spreadsheets write it', () => {
    expect(parseTsv('6.4\n')).toEqual([['6.4']]);
    expect(parseTsv('6.4\r\n')).toEqual([['6.4']]);
    expect(parseTsv('')).toEqual([]);
  });

  it('keeps empty cells, also at the end of a row', () => {
    expect(parseTsv('a\t\tb\t\n\t\t\t')).toEqual([
      ['a', '', 'b', ''],
      ['', '', '', ''],
    ]);
  });

  it('reads quoted cells with tabs, breaks and doubled quotes', () => {
    expect(parseTsv('"two\nlines"\t"a ""b"""\t5"')).not.toHaveLength(0);
    expect(parseTsv('"two\nlines"\t"a ""b"""')).toEqual([['two\nlines', 'a "b"']]);
  });

  it('does not let one lone quote swallow the rows under it', () => {
    expect(parseTsv('"0-6\t1\n6-12\t2')).toEqual([
      ['"0-6', '1'],
      ['6-12', '2'],
    ]);
  });
});

describe('formatTsv', () => {
  it('comes back as it went out', () => {
    const rows = [
      ['6.4', '', 'a\tb'],
      ['"q"', 'two\nlines', ' space '],
    ];
    expect(parseTsv(formatTsv(rows))).toEqual(rows);
  });
});

describe('parseDelimited', () => {
  it('reads a comma file with quoted commas and a byte-order mark', () => {
    expect(parseDelimited('\uFEFFplot,"P, Bray"\n"North, top",41\n', ',')).toEqual([
      ['plot', 'P, Bray'],
      ['North, top', '41'],
    ]);
  });
});
