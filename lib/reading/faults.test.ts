import { describe, expect, it } from 'vitest';
import { readTable } from './readTable';
import type { Reading } from './types';

/** Faults met in real data files; each must be seen, and no number may be changed because of it. */
function read(...lines: string[]): Reading {
  return readTable({ fileName: 'a.csv', text: lines.join('\n') });
}

const codes = (reading: Reading, sample = 0) =>
  reading.samples[sample]?.results.map((result) => result.doubts.map((doubt) => doubt.code)) ?? [];
const HEAD = 'Sample ID,pH 1:1,Mehlich-3 P (ppm),Mehlich-3 K (ppm),Mehlich-3 Ca (ppm),Mehlich-3 Mg (ppm)';

describe('faults of laboratories and files', () => {
  it('doubts a sample that repeats the one above it', () => {
    const reading = read(HEAD, 'A,6.5,40,150,1500,200', 'B,6.5,40,150,1500,200', 'C,6.6,41,155,1490,205');
    expect(codes(reading, 1).every((list) => list.includes('same-as-above'))).toBe(true);
    expect(codes(reading, 2).flat()).not.toContain('same-as-above');
  });
  it('keeps the sign and the limit of "<", and never makes it 0', () => {
    const result = read('Sample ID,Boron (ppm),Zinc (ppm)', 'A,<0.1,2.0').samples[0]?.results[0];
    expect(result).toMatchObject({ value: 0.1, qualifier: '<', printed: '<0.1' });
  });
  it('gives no day for the years 0023 and 2923, and says so', () => {
    const reading = read('Sample ID,Date Sampled,pH,P (ppm)', 'A,10/05/0023,6.5,40', 'B,2923-04-01,6.6,41');
    expect(reading.samples.map((sample) => sample.dateSampled)).toEqual([null, null]);
    expect(reading.samples.map((sample) => sample.dateSampledPrinted)).toEqual(['10/05/0023', '2923-04-01']);
    expect(reading.warnings.filter((warning) => warning.code === 'date-impossible')).toHaveLength(2);
  });
  it('keeps two samples of one name apart and says so', () => {
    const reading = read('Sample ID,pH,P (ppm)', 'North,6.5,40', 'North,7.1,12');
    expect(reading.samples).toHaveLength(2);
    expect(reading.warnings.map((warning) => warning.code)).toContain('same-name');
  });
  it('doubts a lost decimal point and names the likely number', () => {
    const result = read('Sample ID,pH (1:1),P (ppm)', 'A,73,40').samples[0]?.results[0];
    expect(result).toMatchObject({ value: 73, printed: '73' });
    expect(result?.confidence).toBeLessThan(0.5);
    expect(result?.doubts[0]?.sentence).toContain('7.3');
  });
  it('doubts shares that do not add to 100', () => {
    const head = 'Sample ID,pH,% K,% Ca,% Mg,% H';
    expect(codes(read(head, 'A,6.1,5,61,12,12')).flat()).toContain('shares-off');
    expect(codes(read(head, 'A,6.1,5,66,16,13')).flat()).not.toContain('shares-off');
  });
  it('doubts cations that do not fit the capacity', () => {
    const head = 'Sample ID,K (ppm),Ca (ppm),Mg (ppm),H meq/100g,CEC meq/100g';
    expect(codes(read(head, 'A,195,2004,243,1.0,13.5')).flat()).not.toContain('cations-off');
    expect(codes(read(head, 'A,195,2004,243,1.0,19.5')).flat()).toContain('cations-off');
  });
  it('doubts ppm that do not fit meq', () => {
    const head = 'Sample ID,Ca (ppm),Ca meq/100g,pH';
    expect(codes(read(head, 'A,2004,10.0,6.5')).flat()).not.toContain('ppm-meq-off');
    expect(codes(read(head, 'A,2004,13.0,6.5')).flat()).toContain('ppm-meq-off');
  });
  it('doubts a higher rating on a lower number', () => {
    const reading = read('Sample ID,pH,P (ppm),Rating', 'A,6.5,80 L,', 'B,6.4,20 H,');
    expect(codes(reading, 0).flat()).toContain('rating-order');
  });
  it('gives no unit and no method that the file does not give', () => {
    const result = read('Sample ID,pH,P,K', 'A,6.5,40,150').samples[0]?.results[1];
    expect(result).toMatchObject({ analyte: 'phosphorus', unit: null, method: null });
    expect(result?.doubts.map((doubt) => doubt.code)).toEqual(['unit-missing', 'method-missing']);
    expect(result?.confidence).toBeLessThan(0.95);
  });
  it('keeps P2O5 as printed', () => {
    expect(read('Sample ID,pH,P2O5 (ppm)', 'A,6.5,92').samples[0]?.results[1]).toMatchObject({
      form: 'P2O5',
      value: 92,
    });
  });
  it('gives one analyte in two units as two rows, the one nearest to mg/kg first choice', () => {
    const results = read('Sample ID,K (lb/A),K (ppm),pH', 'A,300,150,6.5').samples[0]?.results ?? [];
    expect(results.slice(0, 2).map((result) => [result.unit, result.primary])).toEqual([
      ['lb/acre', false],
      ['mg/kg', true],
    ]);
  });
  it('reads shares of bases as such', () => {
    const result = read('Sample ID,pH,% of Exchangeable Bases K', 'A,6.5,5').samples[0]?.results[1];
    expect(result?.analyte).toBe('sat_k');
  });
});

describe('hostile data files', () => {
  it.each([
    ['no analytes', 'a,b\n1,2\n', 'no-results'],
    ['only blanks', ' \n\n', 'empty'],
    ['too many columns', `${'x,'.repeat(1001)}x\n`, 'table-too-large'],
    ['too many rows', 'a,b\n'.repeat(20_002), 'table-too-large'],
  ])('%s', (_name, text, code) => {
    expect(readTable({ fileName: 'a.csv', text }).error?.code).toBe(code);
  });
  it('takes headers such as __proto__ and constructor for words', () => {
    const reading = read('Sample ID,__proto__,constructor,pH,P (ppm)', 'A,x,y,6.5,40');
    expect(reading.samples[0]?.results).toHaveLength(2);
  });
  it('removes control and direction characters from names', () => {
    const reading = read('Sample ID,pH,P (ppm)', 'Top\u202e bed\u0007,6.5,40');
    expect(reading.samples[0]?.sampleId).toBe('Top bed');
  });
});
