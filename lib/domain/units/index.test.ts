import { describe, expect, it } from 'vitest';
import {
  acreToThousand,
  centimetres,
  elementOfOxide,
  formatArea,
  formatDepth,
  formatMass,
  formatRate,
  gramsPerM2,
  inches,
  kilograms,
  lbPer1000SqFt,
  lbPerAcre,
  lbPerAcreToMgPerKg,
  mgPerKg,
  mgPerKgToLbPerAcre,
  oxideOfElement,
  pounds,
  squareFeet,
  squareMetres,
  toCentimetres,
  toGramsPerM2,
  toInches,
  toKilograms,
  toLbPer1000SqFt,
  toPounds,
  toSquareFeet,
  toSquareMetres,
} from '.';

describe('areas, lengths and weights', () => {
  it('follows the definitions of foot, inch and pound (international yard and pound, 1959)', () => {
    expect(toSquareMetres(squareFeet(1000))).toBeCloseTo(92.90304, 10);
    expect(toCentimetres(inches(6))).toBeCloseTo(15.24, 12);
    expect(toKilograms(pounds(1))).toBeCloseTo(0.45359237, 12);
    expect(toPounds(kilograms(0.45359237))).toBeCloseTo(1, 12);
    expect(toSquareFeet(toSquareMetres(squareFeet(2500)))).toBeCloseTo(2500, 9);
    expect(toInches(toCentimetres(inches(7)))).toBeCloseTo(7, 12);
  });

  it('agrees with the square metre of 10.764 sq ft (Iowa State University conversion table)', () => {
    expect(toSquareFeet(squareMetres(1))).toBeCloseTo(10.764, 3);
  });

  it('turns rates by the same definitions', () => {
    expect(toGramsPerM2(lbPer1000SqFt(1))).toBeCloseTo(4.88243, 5);
    expect(toLbPer1000SqFt(gramsPerM2(4.88243))).toBeCloseTo(1, 5);
    // 43,560 sq ft to the acre.
    expect(acreToThousand(lbPerAcre(43.56))).toBeCloseTo(1, 12);
    // Royal Horticultural Society, Acidifying soil: 135 to 270 g/m2 of sulfur.
    expect(toLbPer1000SqFt(gramsPerM2(135))).toBeCloseTo(27.65, 2);
  });

  it('refuses what is no quantity', () => {
    expect(() => squareFeet(-1)).toThrow(RangeError);
    expect(() => kilograms(Number.NaN)).toThrow(RangeError);
  });
});

describe('oxides', () => {
  it('agrees within 0.1 % with the printed factors of Virginia Tech (P 2.2910, K 1.2051) and British Columbia (0.437, 0.830)', () => {
    expect(oxideOfElement('P2O5', 1) / 2.291).toBeCloseTo(1, 3);
    expect(oxideOfElement('K2O', 1) / 1.2051).toBeCloseTo(1, 3);
    expect(elementOfOxide('P2O5', 1)).toBeCloseTo(0.4365, 3);
    expect(elementOfOxide('K2O', 1)).toBeCloseTo(0.8301, 3);
  });
});

describe('lb per acre and mg/kg', () => {
  it('is twice the ppm for a stated slice of 2,000,000 lb (Penn State)', () => {
    const up = mgPerKgToLbPerAcre(mgPerKg(30), { statedLbPerAcre: 2_000_000 });
    expect(up).toEqual({ ok: true, value: 60 });
    const down = lbPerAcreToMgPerKg(lbPerAcre(60), { statedLbPerAcre: 2_000_000 });
    expect(down).toEqual({ ok: true, value: 30 });
  });

  it('finds the slice of 0.56 ft at 1.33 g/cm3: 2,024,458 lb (Penn State)', () => {
    const up = mgPerKgToLbPerAcre(mgPerKg(1_000_000), { depth: inches(0.56 * 12), densityGPerCm3: 1.33 });
    expect(up.ok && Math.abs(up.value / 2_024_458 - 1)).toBeLessThan(1e-3);
  });

  it('refuses without depth or density', () => {
    expect(lbPerAcreToMgPerKg(lbPerAcre(60), {})).toEqual({ ok: false, reason: 'depth-missing' });
    expect(lbPerAcreToMgPerKg(lbPerAcre(60), { depth: inches(6) })).toEqual({ ok: false, reason: 'density-missing' });
  });
});

describe('words', () => {
  it('follows the reader’s units', () => {
    expect(formatArea(squareMetres(92.90304), 'customary')).toBe('1,000 sq ft');
    expect(formatArea(squareMetres(92.90304), 'metric')).toBe('92.9 m²');
    expect(formatDepth(centimetres(0), centimetres(15.24), 'customary')).toBe('0–6 in');
    expect(formatDepth(centimetres(0), centimetres(15.24), 'metric')).toBe('0–15 cm');
    expect(formatMass(kilograms(4.5359237), 'customary')).toBe('10 lb');
    expect(formatMass(kilograms(0.25), 'metric')).toBe('250 g');
    expect(formatRate(gramsPerM2(48.8243), 'customary')).toBe('10 lb per 1,000 sq ft');
  });
});
