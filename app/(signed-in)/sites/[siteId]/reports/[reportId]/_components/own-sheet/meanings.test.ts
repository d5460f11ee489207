import { describe, expect, it } from 'vitest';
import { asAnalyte, asKind, comingOf, kindOptions, previewColumns } from './meanings';

const P = { kind: 'result', analyte: 'phosphorus', unit: 'mg/kg', form: 'P2O5', method: 'Olsen' } as const;

describe('what a column holds', () => {
  it('keeps what is known while it stays a result, and starts open as another kind', () => {
    expect(asKind('result', P)).toBe(P);
    expect(asKind('depth', P)).toEqual({ kind: 'depth', unit: null });
    expect(asKind('skip', P)).toEqual({ kind: 'skip' });
    expect(asKind('no such kind', P)).toEqual({ kind: 'skip' });
  });
  it('drops a method that the new analyte does not have', () => {
    expect(asAnalyte('potassium', P)).toMatchObject({ analyte: 'potassium', method: null, unit: 'mg/kg' });
    expect(asAnalyte('not an analyte', P)).toBe(P);
  });
  it('offers a result only where a line is a sample', () => {
    const kinds = (layout: Parameters<typeof kindOptions>[0]) => kindOptions(layout).map((one) => one.value);
    expect(kinds('sample-per-row')).toContain('result');
    expect(kinds('sample-per-row')).not.toContain('value');
    expect(kinds('number-per-row')).not.toContain('result');
  });
});

describe('what would come of the sheet', () => {
  const names = [
    { name: 'North', samples: 3, withoutDay: 1, plotId: 'n' },
    { name: 'Orchard', samples: 2, withoutDay: 0, plotId: null },
  ];
  it('counts samples with a plot and a day', () => {
    expect(comingOf(names, (name) => (name === 'North' ? 'n' : null))).toEqual({ samples: 2, leftOut: 3 });
    expect(comingOf(names, () => 'n')).toEqual({ samples: 4, leftOut: 1 });
  });
  it('shows each kind of result once', () => {
    const result = (analyte: string, unit: string | null) => ({
      analyte,
      unit,
      form: null,
      printed: '1',
      method: null,
      impossible: null,
    });
    const sample = (...results: ReturnType<typeof result>[]) => ({
      name: 'North',
      takenOn: null,
      depthFromCm: null,
      depthToCm: null,
      results,
    });
    const columns = previewColumns([
      sample(result('soil_ph_water', 'pH')),
      sample(result('soil_ph_water', 'pH'), result('zinc', 'mg/kg')),
    ]);
    expect(columns.map((one) => one.head)).toEqual(['Soil pH (in water)', 'Zinc, mg/kg']);
  });
});
