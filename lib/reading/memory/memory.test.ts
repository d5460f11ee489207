import { describe, expect, it } from 'vitest';
import type { Reading, ReadResult } from '../types';
import { applyMemory, withoutMemory } from './apply';
import { findLayout, layoutOf, plainLabel, sameLayout } from './layout';
import { type ConfirmedRow, lessonsOf, memoryOf } from './lessons';

const at = (x: number, y: number): readonly [number, number, number, number] => [x, y, x + 0.05, y + 0.012];

function row(over: Partial<ReadResult> & Pick<ReadResult, 'analyte' | 'label'>): ReadResult {
  return {
    printed: '40',
    value: 40,
    qualifier: '=',
    unit: 'mg/kg',
    unitPrinted: 'ppm',
    form: 'element',
    method: 'M3',
    methodPrinted: 'Mehlich-3',
    rating: null,
    primary: true,
    page: 1,
    box: at(0.5, 0.2),
    cell: null,
    confidence: 0.97,
    doubts: [],
    ...over,
  };
}

function reading(...samples: (readonly ReadResult[])[]): Reading {
  return {
    file: 'r.pdf',
    kind: 'soil',
    error: null,
    pages: 1,
    warnings: [],
    lab: { name: 'Marsh Lane Soil Bench' },
    samples: samples.map((results) => ({
      sampleId: 'North',
      labNumber: null,
      fieldName: null,
      depth: null,
      dateSampled: null,
      dateSampledPrinted: null,
      dateReported: null,
      dateReportedPrinted: null,
      results,
    })),
    recommendations: [],
  };
}

const confirmed = (from: ReadResult, over: Partial<ConfirmedRow> = {}): ConfirmedRow => ({
  ...from,
  removed: false,
  ...over,
});
const memory = (rows: readonly ConfirmedRow[], on = '2025-05-03') => memoryOf([{ on, lessons: lessonsOf(rows) }]);
const layout = (name: string | null, ...samples: (readonly ReadResult[])[]) => {
  const found = layoutOf({ laboratory: name, samples });
  if (found === null) throw new Error('This is a layout.');
  return found;
};

const list = (labels: readonly string[]) =>
  labels.map((label, line) => row({ analyte: 'phosphorus', label, box: at(0.5, 0.2 + line * 0.02) }));
const LABELS = ['pH', 'Phosphorus (P)', 'Potassium (K)', 'Calcium (Ca)', 'Magnesium (Mg)', 'Zinc (Zn)'];

describe('a layout', () => {
  it('is the same next year, in another unit, with other target ranges and other numbers', () => {
    const before = ['pH', 'P (ppm) 2025', 'K (ppm)', 'Phosphorus (25-50 ppm)'];
    const after = ['pH', 'P (lb/A) 2026', 'K (lb/A)', 'Phosphorus (30 to 60 ppm)'];
    expect(layout('Marsh Lane Labs, Inc.', list(before)).fingerprint).toBe(
      layout('MARSH LANE LABS INC', list(after)).fingerprint,
    );
  });
  it('is another one at another laboratory, with other labels, and with the numbers side by side', () => {
    const one = layout('Marsh Lane', list(LABELS));
    const across = LABELS.map((label, column) =>
      row({ analyte: 'phosphorus', label, box: at(0.1 + column * 0.12, 0.4) }),
    );
    const others = [
      layout('Hollin Vale', list(LABELS)),
      layout('Marsh Lane', list(['Reaction', 'Phosphate', 'Potash', 'Lime', 'Magnesia', 'Boron'])),
      layout('Marsh Lane', across),
      layout(
        'Marsh Lane',
        LABELS.map((label, line) =>
          row({ analyte: 'phosphorus', label, box: null, cell: { sheet: 1, row: line + 2, column: 2 } }),
        ),
      ),
    ];
    expect(others.map((other) => other.fingerprint === one.fingerprint || sameLayout(other, one))).toEqual([
      false,
      false,
      false,
      false,
    ]);
    expect(new Set(others.map((other) => other.shape))).toEqual(new Set(['page-down', 'page-across', 'data-down']));
  });
  it('is found again when a cell was blank, and not when half of it is missing', () => {
    const known = [layout('Marsh Lane', list(LABELS))];
    expect(findLayout(layout('Marsh Lane', list(LABELS.slice(0, 5))), known)).toBe(known[0]);
    expect(findLayout(layout('Marsh Lane', list(LABELS.slice(0, 3))), known)).toBeNull();
  });
  it('without a laboratory needs exactly the same labels', () => {
    const known = [layout(null, list(LABELS))];
    expect(findLayout(layout(null, list(LABELS)), known)).toBe(known[0]);
    expect(findLayout(layout(null, list(LABELS.slice(0, 5))), known)).toBeNull();
  });
  it('is none with one label', () => {
    expect(layoutOf({ laboratory: 'Marsh Lane', samples: [list(['pH'])] })).toBeNull();
  });
  it('calls a label the same with and without its unit', () => {
    expect(['P (ppm)', 'P, lb/acre', 'P'].map(plainLabel)).toEqual(['p', 'p', 'p']);
  });
  it('learns nothing from a label that is only a unit', () => {
    expect(['ppm', 'meq/100 g', '2025'].map(plainLabel)).toEqual(['', '', '']);
    const bare = row({ analyte: 'phosphorus', label: 'ppm' });
    expect(lessonsOf([confirmed(bare)])).toEqual([]);
    const zinc = row({ analyte: 'zinc', label: 'ppm' });
    expect(applyMemory(reading([zinc, K]), memory([confirmed(bare)])).samples[0]?.results[0]).toEqual(zinc);
  });
});

const UNIT_MISSING = { code: 'unit-missing', sentence: 'The page gives no unit for this number.' };
const PH_OPEN = { code: 'ph-method-missing', sentence: 'The page does not say how pH was measured.' };
const P = row({ analyte: 'phosphorus', label: 'P' });
const K = row({ analyte: 'potassium', label: 'K' });

describe('what was confirmed', () => {
  it('fills a unit and a method that the page leaves open, keeps the doubt, and says on which day', () => {
    const open = row({
      analyte: 'phosphorus',
      label: 'P',
      unit: null,
      method: null,
      confidence: 0.8,
      doubts: [UNIT_MISSING],
    });
    const read = applyMemory(reading([open, K]), memory([confirmed(P), confirmed(K)])).samples[0]?.results[0];
    expect(read).toMatchObject({ unit: 'mg/kg', method: 'M3', value: 40, printed: '40', confidence: 0.8 });
    expect(read?.learnt).toMatchObject({ on: '2025-05-03', filled: ['unit', 'method'] });
    expect(read && withoutMemory(read)).toEqual({ ...open, learnt: null });
    expect(read?.doubts).toEqual([UNIT_MISSING]);
  });
  it('names the pH that the page leaves open', () => {
    const open = row({
      analyte: 'soil_ph_water',
      label: 'pH',
      unit: 'pH',
      form: null,
      method: null,
      doubts: [PH_OPEN],
    });
    const said = confirmed(open, { analyte: 'soil_ph_salt', method: 'CaCl2' });
    const read = applyMemory(reading([open, K]), memory([said])).samples[0]?.results[0];
    expect(read).toMatchObject({ analyte: 'soil_ph_salt', method: 'CaCl2', learnt: { filled: ['analyte', 'method'] } });
    expect(read?.doubts).toContainEqual(PH_OPEN);
  });
  it('doubts a page that says another unit, method or analyte, and changes nothing of it', () => {
    for (const other of [
      row({ analyte: 'phosphorus', label: 'P', unit: 'lb/acre' }),
      row({ analyte: 'phosphorus', label: 'P', method: 'Olsen' }),
      row({ analyte: 'potassium', label: 'P' }),
      row({ analyte: 'phosphorus', label: 'P', form: 'P2O5' }),
    ]) {
      const read = applyMemory(reading([other, K]), memory([confirmed(P)])).samples[0]?.results[0];
      const { doubts, confidence, ...rest } = read ?? P;
      expect(rest).toEqual((({ doubts: _, confidence: __, ...same }) => same)(other));
      expect(doubts.map((doubt) => doubt.code)).toEqual(['learnt-otherwise']);
      expect(doubts[0]?.sentence).toContain('On 3 May 2025 you confirmed "P"');
      expect(confidence).toBeLessThanOrEqual(0.6);
    }
  });
  it('says so and adds nothing where page and memory agree', () => {
    const read = applyMemory(reading([P, K]), memory([confirmed(P)])).samples[0]?.results ?? [];
    expect(read[0]).toEqual({ ...P, learnt: { on: '2025-05-03', filled: [], before: expect.anything() } });
    expect(read[1]).toEqual(K);
  });
  it('never takes a doubt away, raises a confidence, touches a number or changes how many rows there are', () => {
    const doubts = [UNIT_MISSING, PH_OPEN, { code: 'implausible', sentence: 'It lies outside.' }];
    const rows = [null, 'mg/kg', 'lb/acre', '%'].flatMap((unit) =>
      [null, 'M3', 'Olsen'].flatMap((method) =>
        [0.2, 0.6, 0.97].map((confidence) =>
          row({
            analyte: 'phosphorus',
            label: 'P',
            unit: unit as ReadResult['unit'],
            method: method as ReadResult['method'],
            confidence,
            doubts,
          }),
        ),
      ),
    );
    const lessons = [
      confirmed(P),
      confirmed(row({ analyte: 'sat_k', label: 'P', unit: '%', method: 'of_CEC', form: null })),
    ];
    for (const known of [[], lessons.slice(0, 1), lessons]) {
      const after = applyMemory(reading(rows), memory(known)).samples[0]?.results ?? [];
      expect(after).toHaveLength(rows.length);
      for (const [index, read] of after.entries()) {
        expect(read.doubts).toEqual(expect.arrayContaining(doubts));
        expect(read.confidence).toBeLessThanOrEqual(rows[index]?.confidence ?? 0);
        expect([read.value, read.printed, read.qualifier]).toEqual([40, '40', '=']);
      }
    }
  });
  it('leaves open which of two meanings of one label is meant, unless the column says it', () => {
    const ppm = confirmed(row({ analyte: 'potassium', label: 'K', box: at(0.3, 0.2) }));
    const share = confirmed(row({ analyte: 'potassium', label: 'K', unit: 'meq/100g', box: at(0.7, 0.2) }));
    const open = { analyte: 'potassium', label: 'K', unit: null, doubts: [UNIT_MISSING] } as const;
    const read = applyMemory(
      reading([row({ ...open, box: at(0.5, 0.2) }), row({ ...open, box: at(0.71, 0.3) })]),
      memory([ppm, share]),
    ).samples[0]?.results;
    expect(read?.map((one) => one.unit)).toEqual([null, 'meq/100g']);
  });
  it('doubts a list whose numbers come from another column than the confirmed results', () => {
    const wanted = [
      row({ analyte: 'phosphorus', label: 'P', box: at(0.75, 0.2) }),
      row({ analyte: 'potassium', label: 'K', box: at(0.75, 0.22) }),
      row({ analyte: 'calcium', label: 'Ca', box: at(0.75, 0.24) }),
    ];
    const known = memory([confirmed(P), confirmed(K)]);
    const codes = applyMemory(reading(wanted), known).samples[0]?.results.map((one) => one.doubts.map((d) => d.code));
    expect(codes).toEqual([['learnt-otherwise'], ['learnt-otherwise'], []]);
    const two = applyMemory(reading(wanted, wanted), known).samples[0]?.results;
    expect(two?.every((one) => one.doubts.length === 0)).toBe(true);
  });
  it('doubts a number that the filled unit makes unbelievable', () => {
    const open = row({
      analyte: 'phosphorus',
      label: 'P',
      printed: '90000',
      value: 90_000,
      unit: null,
      doubts: [UNIT_MISSING],
    });
    const read = applyMemory(reading([open, K]), memory([confirmed(P)])).samples[0]?.results[0];
    expect(read?.doubts.map((doubt) => doubt.code)).toEqual(['unit-missing', 'implausible']);
  });
});

describe('lessons', () => {
  it('come only from rows left in that have a label and an analyte', () => {
    const rows = [
      confirmed(P, { removed: true }),
      confirmed(K, { analyte: null }),
      confirmed(row({ analyte: 'zinc', label: '' })),
      confirmed(row({ analyte: 'calcium', label: 'Ca' })),
    ];
    expect(lessonsOf(rows).map((one) => one.analyte)).toEqual(['calcium']);
  });
  it('are one where samples say the same, and take the newest confirmation per label', () => {
    const once = lessonsOf([confirmed(P, { unit: null }), confirmed(P), confirmed(P, { box: at(0.7, 0.2) })]);
    expect(once).toHaveLength(1);
    expect(once[0]).toMatchObject({ unit: 'mg/kg', columns: [0.53, 0.73] });
    const both = memoryOf([
      { on: '2026-04-01', lessons: lessonsOf([confirmed(P, { method: 'Olsen' })]) },
      { on: '2025-05-03', lessons: lessonsOf([confirmed(P), confirmed(K)]) },
    ]);
    expect(both.get('p')).toMatchObject({ on: '2026-04-01', lessons: [{ method: 'Olsen' }] });
    expect(both.get('k')?.on).toBe('2025-05-03');
  });
});
