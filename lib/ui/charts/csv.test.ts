import Papa from 'papaparse';
import { describe, expect, it } from 'vitest';
import { driftCsv, driftRows, safeText } from './csv';
import { boron, boronHistory, ph, phBroken, potassium, sulfur } from './sample-data';

const read = (text: string) => Papa.parse<Record<string, string>>(text, { header: true, skipEmptyLines: true });

describe('driftRows', () => {
  it('puts tests and amendments in one order of time', () => {
    expect(driftRows(phBroken, sulfur).map((r) => r.id)).toEqual(['p1', 'p2', 'p3', 'a1', 'p4', 'a2', 'p5']);
  });

  it('gives a limit no value', () => {
    const [first] = driftRows(boronHistory, []);
    expect(first?.value).toBeNull();
    expect(first?.printed).toBe('< 0.1');
    expect(first?.note).toBe('below what the laboratory can read');
  });
});

describe('driftCsv', () => {
  it('can be read back with ISO days, units in the header and numbers as numbers', () => {
    const { data, errors } = read(driftCsv(driftRows(boronHistory, []), boron));
    expect(errors).toEqual([]);
    expect(data).toHaveLength(4);
    expect(data[2]?.date).toBe('2025-04-11');
    expect(data[2]?.['Boron (ppm)']).toBe('0.4');
    expect(data[0]?.['Boron (ppm)']).toBe('');
    expect(data[0]?.['as printed']).toBe('< 0.1');
  });

  it('has no unit for pH, and ends lines in CRLF', () => {
    const text = driftCsv(driftRows(phBroken, sulfur), ph);
    expect(text.split('\r\n')[0]).toContain('date,kind,pH,as printed');
    expect(text.replaceAll('\r\n', '')).not.toContain('\n');
  });

  it('keeps negative numbers numbers and disarms formulas', () => {
    const [first] = boronHistory;
    if (first === undefined) throw new Error('no sample');
    const point = {
      ...first,
      qualifier: 'exact',
      value: -1.5,
      printed: '-1.5',
      method: '=HYPERLINK("x")',
      laboratory: '@sum',
    } as const;
    const { data } = read(driftCsv(driftRows([point], []), potassium));
    expect(data[0]?.['Potassium (ppm)']).toBe('-1.5');
    expect(data[0]?.['as printed']).toBe('-1.5');
    expect(data[0]?.method).toBe('\'=HYPERLINK("x")');
    expect(data[0]?.laboratory).toBe("'@sum");
  });
});

describe('safeText', () => {
  // OWASP, "CSV Injection": a cell may not begin with = + - @ tab or carriage return.
  it.each(['=1+1', '+1+1', '-1+1', '@x', '\tx', '\rx'])('starts %j with an apostrophe', (text) => {
    expect(safeText(text).replace(/^"/, '').startsWith("'")).toBe(true);
  });
  it.each(['-1.5', '+2', '< 0.1', 'Bed 3', ''])('leaves %j as it is', (text) => expect(safeText(text)).toBe(text));
  it('quotes commas, quotes and line breaks', () => {
    expect(safeText('a, "b"\nc')).toBe('"a, ""b""\nc"');
  });
});
