import { describe, expect, it } from 'vitest';
import { bandChoices } from './band-choices';
import { bandField, readBands } from './band-values';
import { bandText, methodText } from './band-words';

const row = (at: number, change: Record<string, string> = {}) => ({
  [`analyte-${at}`]: 'soil_ph_water',
  [`low-${at}`]: '6,0',
  [`high-${at}`]: '6.5',
  [`unit-${at}`]: 'pH',
  [`method-${at}`]: '',
  ...change,
});

describe('readBands', () => {
  it('reads both decimal signs, and no method as any method', () => {
    expect(readBands(row(3), [3])).toEqual({
      ok: true,
      bands: [{ analyte: 'soil_ph_water', low: 6, high: 6.5, unit: 'pH', method: null }],
    });
  });

  it('refuses an upside-down band, an analyte named twice and what is no number, each at its field', () => {
    expect(readBands(row(1, { 'low-1': '7' }), [1])).toMatchObject({ errors: { 'high-1': expect.any(String) } });
    expect(readBands({ ...row(1), ...row(2) }, [1, 2])).toMatchObject({ errors: { 'analyte-2': expect.any(String) } });
    expect(readBands(row(1, { 'low-1': '' }), [1])).toMatchObject({ errors: { 'low-1': expect.any(String) } });
  });

  it('finds the field a refusal speaks of', () => {
    expect(bandField('bands.1.high', [2, 7])).toBe('high-7');
    expect(bandField('name', [2])).toBe('name');
  });
});

describe('words', () => {
  it('say a band without needless zeros, and pH without a unit', () => {
    const band = { analyte: 'x', unit: 'pH', method: null };
    expect(bandText({ ...band, low: '6.0', high: '6.50' })).toBe('6 to 6.5');
    expect(bandText({ ...band, unit: 'mg/kg', low: '100', high: '200' })).toContain('100 to 200 ');
    expect(bandText({ ...band, low: null, high: '7' })).toBe('up to 7');
    expect(methodText({ method: 'M3' })).toBe('Mehlich-3');
  });
});

describe('bandChoices', () => {
  it('offers each analyte its usual unit and only units of its kind', () => {
    for (const choice of bandChoices()) expect(choice.units.map((unit) => unit.value)).toContain(choice.unit);
    const ph = bandChoices().find((choice) => choice.key === 'soil_ph_water');
    expect(ph?.units.map((unit) => unit.value)).not.toContain('mg/kg');
  });
});
