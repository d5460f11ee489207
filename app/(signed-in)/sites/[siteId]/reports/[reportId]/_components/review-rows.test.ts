import { describe, expect, it } from 'vitest';
import { makeReviewSample, makeRow } from '@/tests/support/review-rows';
import {
  columnsFor,
  doubtsOf,
  notesOf,
  placeOf,
  printedWords,
  stableOrder,
  toGridRow,
  twinOf,
  valueFault,
} from './review-rows';

describe('doubtsOf', () => {
  it('puts each doubt at the cell it is about', () => {
    const doubts = [
      { code: 'unit-missing', sentence: 'no unit' },
      { code: 'method-missing', sentence: 'no method' },
      { code: 'two-readings', sentence: 'two' },
    ];
    const found = doubtsOf(makeRow('a', { doubts, doubtful: true }));
    expect(Object.keys(found).sort()).toEqual(['method', 'unit', 'value']);
  });
  it('says the impossible once, and that it must be mended', () => {
    const doubts = [{ code: 'implausible', sentence: 'far outside' }];
    const found = doubtsOf(makeRow('a', { impossible: 'No pH.', doubts, doubtful: true }));
    expect(found).toEqual({ value: [{ code: 'impossible', sentence: 'No pH.', mustMend: true }] });
  });
  it('gives a reason where the reader was only unsure', () => {
    expect(doubtsOf(makeRow('a', { doubtful: true, confidence: 0.8 })).value?.[0]?.code).toBe('unsure');
    expect(doubtsOf(makeRow('a'))).toEqual({});
  });
  it('asks for the analyte of a row without one', () => {
    expect(doubtsOf(makeRow('a', { analyte: null })).analyte?.[0]?.mustMend).toBe(true);
  });
});

describe('what stands on the page', () => {
  it('is the label and the number, the unit only where the label lacks it', () => {
    expect(printedWords(makeRow('a', { label: 'P ppm', printed: '41', unitPrinted: 'ppm' }))).toBe('P ppm: 41');
    expect(printedWords(makeRow('a', { label: 'P', printed: '41', unitPrinted: 'ppm' }))).toBe('P: 41 ppm');
    expect(printedWords(makeRow('a', { label: 'Organic matter', printed: '5.8%', unitPrinted: '%' }))).toBe(
      'Organic matter: 5.8%',
    );
  });
  it("stays the page's own after an edit, and is empty for a row typed in", () => {
    const original = {
      analyte: null,
      printed: '73',
      value: '73',
      qualifier: '=',
      unit: null,
      method: null,
      form: null,
    } as const;
    expect(printedWords(makeRow('a', { label: 'pH', printed: '7.3', state: 'edited', original }))).toBe('pH: 73');
    expect(printedWords(makeRow('a', { state: 'added' }))).toBe('');
  });
  it('has a place: page, line, or by hand', () => {
    expect(placeOf(makeRow('a'))).toBe('Page 1');
    expect(placeOf(makeRow('a', { box: null, cell: { sheet: null, row: 14, column: 3 } }))).toBe('Line 14, column 3');
    expect(placeOf(makeRow('a', { box: null, page: null }))).toBe('Entered by hand');
  });
});

describe('stableOrder', () => {
  const rows = [
    makeRow('a', { ordinal: 1 }),
    makeRow('b', { ordinal: 2 }),
    makeRow('c', { ordinal: 3, reportSampleId: 'sample-2', doubtful: true }),
    makeRow('d', { ordinal: 4, reportSampleId: 'sample-2', impossible: 'no' }),
    makeRow('e', { ordinal: 5, state: 'removed' }),
  ];
  const samples = ['sample-1', 'sample-2'];
  it('begins with what must be mended, then what is doubtful, then the page', () => {
    expect(stableOrder(rows, samples, [])).toEqual(['d', 'c', 'a', 'b']);
  });
  it('keeps a mended row where it was and puts a new one last in its sample', () => {
    const before = stableOrder(rows, samples, []);
    const mended = rows.map((row) => ({ ...row, impossible: null, doubtful: false }));
    const added = makeRow('f', { ordinal: 9, state: 'added' });
    expect(stableOrder([...mended, added], samples, before)).toEqual(['d', 'c', 'a', 'b', 'f']);
  });
  it('drops a removed row', () => {
    expect(stableOrder(rows, samples, ['e', 'a', 'b', 'c', 'd'])).toEqual(['a', 'b', 'c', 'd']);
  });
});

describe('values as typed', () => {
  it('are read as the server reads them', () => {
    const known = new Set(['52 VH']);
    expect(valueFault('6,4', known)).toBeNull();
    expect(valueFault('<0.1', known)).toBeNull();
    expect(valueFault('six', known)).toMatch(/not a value/);
    expect(valueFault('1,500', known)).toMatch(/two ways/);
  });
  it("may always be the page's own characters", () => {
    expect(valueFault('52 VH', new Set(['52 VH']))).toBeNull();
  });
});

describe('columns', () => {
  it('show the form only where it matters', () => {
    const ids = (rows: Parameters<typeof columnsFor>[0]) => columnsFor(rows, false).map((column) => column.id);
    expect(ids([makeRow('a', { form: 'element' })])).not.toContain('form');
    expect(ids([makeRow('a', { form: 'P2O5' })])).toContain('form');
  });
  it('leave out what is on the page where nothing is', () => {
    const typed = makeRow('a', { state: 'added', label: '', printed: '6.4' });
    const gone = makeRow('b', { state: 'removed', label: '', printed: '' });
    expect(columnsFor([typed, gone], false).map((column) => column.id)).not.toContain('printed');
    expect(columnsFor([makeRow('c')], false).map((column) => column.id)).toContain('printed');
  });
  it("offer the methods of the row's own analyte", () => {
    const options = toGridRow(makeRow('a'), undefined).options?.method ?? [];
    expect(options.map((one) => one.value)).toContain('1:1_water');
    expect(options.map((one) => one.value)).not.toContain('M3');
  });
});

describe('twinOf', () => {
  const first = makeReviewSample('a', { ordinal: 1 });
  it('finds the earlier sample of the same plot, day and bag', () => {
    const second = makeReviewSample('b', { ordinal: 2 });
    expect(twinOf(second, [first, second])).toBe(first);
    expect(twinOf(first, [first, second])).toBeUndefined();
  });
  it('is none for another bag, another day, or a sample left out', () => {
    const bag = makeReviewSample('b', { ordinal: 2, composite: 2 });
    expect(twinOf(bag, [first, bag])).toBeUndefined();
    const out = { ...first, leftOutReason: 'not ours' };
    const second = makeReviewSample('b', { ordinal: 2 });
    expect(twinOf(second, [out, second])).toBeUndefined();
  });
});

describe('what an earlier confirmation of the form answers', () => {
  const learnt = (filled: readonly string[]) => ({ on: '2025-05-03', filled: [...filled] });
  it('stands under the cells it filled, until somebody changes them', () => {
    const row = makeRow('a', { learnt: learnt(['unit', 'method']), unit: 'mg/kg', method: 'M3' });
    expect(notesOf(row)).toEqual({
      unit: 'as you confirmed on 3 May 2025',
      method: 'as you confirmed on 3 May 2025',
    });
    const original = { analyte: row.analyte, printed: row.printed, value: row.value, qualifier: row.qualifier };
    const edited = { ...row, unit: 'lb/acre', original: { ...original, unit: 'mg/kg', method: 'M3', form: row.form } };
    expect(Object.keys(notesOf(edited))).toEqual(['method']);
  });
  it('is said beside the place where page and memory agree', () => {
    expect(placeOf(makeRow('a', { learnt: learnt([]) }))).toBe('Page 1, as you confirmed on 3 May 2025');
    expect(placeOf(makeRow('a', { learnt: learnt(['unit']) }))).toBe('Page 1');
    expect(placeOf(makeRow('a'))).toBe('Page 1');
  });
});
