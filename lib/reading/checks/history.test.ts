import { describe, expect, it } from 'vitest';
import { checkHistory, type EarlierTest, type HistoryValue } from './history';

const value = (analyte: HistoryValue['analyte'], printed: string, over: Partial<HistoryValue> = {}): HistoryValue => ({
  analyte,
  printed,
  value: Number(printed),
  qualifier: '=',
  unit: 'mg/kg',
  method: 'M3',
  form: 'element',
  ...over,
});
const test = (on: string, values: readonly HistoryValue[], sampleName: string | null = 'North'): EarlierTest => ({
  on,
  values,
  sampleName,
});
const check = (
  rows: readonly HistoryValue[],
  tests: readonly EarlierTest[],
  over: { on?: string | null; sampleName?: string | null } = {},
) => checkHistory({ on: '2026-04-10', sampleName: 'North', plotName: 'North bed', rows, tests, ...over });
const codes = (rows: readonly HistoryValue[], tests: readonly EarlierTest[]) => {
  const found = check(rows, tests).rows;
  return rows.map((row) => (found.get(row) ?? []).map((doubt) => doubt.code));
};

describe('a jump by two against the history of the plot', () => {
  const before = test('2025-05-03', [value('phosphorus', '40'), value('potassium', '150'), value('zinc', '2.1')]);
  it('is asked about where the numbers of the sample jump together, within rounding', () => {
    const rows = [value('phosphorus', '79'), value('potassium', '305'), value('zinc', '2.2')];
    expect(codes(rows, [before])).toEqual([['factor-two'], ['factor-two'], []]);
    const [sentence] = [...check(rows, [before]).rows.values()].flat().map((doubt) => doubt.sentence);
    expect(sentence).toContain('Phosphorus is twice what it was on 3 May 2025: 40 then, 79 now, like 2 of 3');
  });
  it('is asked about when everything halves', () => {
    expect(codes([value('phosphorus', '20'), value('potassium', '76')], [before])).toEqual([
      ['factor-two'],
      ['factor-two'],
    ]);
  });
  it('is asked about for one number alone only when it is exact to the printed figures', () => {
    const rest = [value('potassium', '160'), value('zinc', '2.0')];
    expect(codes([value('phosphorus', '80'), ...rest], [before])[0]).toEqual(['factor-two']);
    expect(codes([value('phosphorus', '84'), ...rest], [before])[0]).toEqual([]);
    const coarse = test('2025-05-03', [value('boron', '1'), value('potassium', '150')]);
    expect(codes([value('boron', '2'), value('potassium', '160')], [coarse])).toEqual([[], []]);
  });
  it('is asked about when the page gives no unit, and not across units, methods, signs or pH', () => {
    expect(codes([value('phosphorus', '80', { unit: null })], [before])).toEqual([['factor-two']]);
    for (const over of [{ unit: 'lb/acre' }, { method: 'Olsen' }, { qualifier: '<' }, { form: 'P2O5' }] as const) {
      expect(codes([value('phosphorus', '80', over)], [before]).flat()).not.toContain('factor-two');
    }
    const ph = (printed: string) => value('soil_ph_water', printed, { unit: 'pH', method: null, form: null });
    expect(codes([ph('8.0')], [test('2025-05-03', [ph('4.0')])])).toEqual([[]]);
  });
  it('is held against the nearest earlier test, and the nearest later one where there is none', () => {
    const later = test('2027-04-01', [value('phosphorus', '80')]);
    const old = test('2019-04-01', [value('phosphorus', '300')]);
    expect(codes([value('phosphorus', '80')], [old, before, later])).toEqual([['factor-two']]);
    expect(codes([value('phosphorus', '40')], [later, test('2030-04-01', [value('phosphorus', '40')])])).toEqual([
      ['factor-two'],
    ]);
    expect(codes([value('phosphorus', '80')], [])).toEqual([[]]);
  });
});

describe('another unit or method than last time', () => {
  const before = test('2025-05-03', [value('phosphorus', '40'), value('potassium', '150')]);
  it('is asked about', () => {
    const rows = [value('phosphorus', '40', { method: 'Olsen' }), value('potassium', '300', { unit: 'lb/acre' })];
    expect(codes(rows, [before])).toEqual([['method-changed'], ['unit-changed']]);
    const sentences = [...check(rows, [before]).rows.values()].flat().map((doubt) => doubt.sentence);
    expect(sentences[0]).toContain('Mehlich-3');
    expect(sentences[1]).toContain('was 150 mg/kg');
  });
  it('is not, where one side leaves it open or last time had both', () => {
    const both = test('2025-05-03', [value('potassium', '150'), value('potassium', '300', { unit: 'lb/acre' })]);
    expect(codes([value('potassium', '310', { unit: 'lb/acre' })], [both])).toEqual([[]]);
    expect(codes([value('phosphorus', '41', { unit: null, method: null })], [before])).toEqual([[]]);
  });
});

describe("the name of a plot's sample", () => {
  const before = [test('2025-05-03', [value('phosphorus', '40')], 'N-1'), test('2024-05-03', [], 'Old north')];
  const said = (sampleName: string | null, tests = before) =>
    check([], tests, { sampleName }).sample.map((doubt) => doubt.code);
  it('is asked about when it is new', () => {
    expect(said('South 2')).toEqual(['sample-renamed']);
    expect(check([], before, { sampleName: 'South 2' }).sample[0]?.sentence).toContain('was called "N-1"');
  });
  it("is not when it was used before, is the plot's own, is missing, or nothing is known", () => {
    expect([said('n 1'), said('OLD NORTH'), said('North bed'), said(null), said('South 2', [])].flat()).toEqual([]);
  });
});
