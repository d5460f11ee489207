import { describe, expect, it } from 'vitest';
import { basisDoubts } from './checks/basis';
import { repeatsAbove } from './checks/forms';
import { checkHistory } from './checks/history';
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

describe('faults seen in the reports of nine laboratories', () => {
  const of = (reading: Reading) => {
    const [sample] = reading.samples;
    if (sample === undefined) throw new Error('No sample was read.');
    return sample;
  };
  const against = (now: Reading, before: Reading, on: string) =>
    checkHistory({
      on: '2026-04-10',
      sampleName: of(now).sampleId,
      plotName: 'The long bed',
      rows: of(now).results,
      tests: [{ on, sampleName: of(before).sampleId, values: of(before).results }],
    });
  const said = (found: ReturnType<typeof against>) => [...found.rows.values()].flat().map((doubt) => doubt.code);

  it('1: a cell of the data file that repeats the sample above is named where page and file differ', () => {
    const file = read(HEAD, 'A,6.5,40,150,1500,200', 'B,6.7,52,150,1710,231');
    const page = read(HEAD, 'A,6.5,40,150,1500,200', 'B,6.7,52,188,1710,231');
    const [above, here] = file.samples.map((sample) => sample.results);
    const differing = here?.filter((cell, at) => cell.value !== page.samples[1]?.results[at]?.value) ?? [];
    expect(differing.map((cell) => [cell.analyte, repeatsAbove(cell, above ?? [])])).toEqual([['potassium', true]]);
    expect(here?.filter((cell) => repeatsAbove(cell, above ?? [])).map((cell) => cell.analyte)).toEqual(['potassium']);
  });
  it('2: no form of "less than" becomes 0', () => {
    for (const printed of ['<0.1', '< 0.1', '<.1', '≤0.1']) {
      const result = of(read('Sample ID,Boron (ppm),Zinc (ppm)', `A,${printed},2.0`)).results[0];
      expect(result).toMatchObject({ value: 0.1, qualifier: '<' });
    }
  });
  it('3: a day of no possible year is kept as printed and asked about', () => {
    for (const printed of ['4/1/0023', '2923-04-01', '31/04/2025', '00/00/0000']) {
      const reading = read('Sample ID,Date Sampled,pH,P (ppm)', `A,${printed},6.5,40`);
      expect(of(reading)).toMatchObject({ dateSampled: null, dateSampledPrinted: printed });
      expect(reading.warnings.map((warning) => warning.code).some((code) => code.startsWith('date-'))).toBe(true);
    }
  });
  it('4: lb/acre in one file and ppm in the next is asked about, with the unit and without it', () => {
    const ppm = read('Sample ID,pH,P (ppm),K (ppm)', 'North,6.5,40,150');
    expect(said(against(read('Sample ID,pH,P (lb/A),K (lb/A)', 'North,6.5,80,300'), ppm, '2025-04-01'))).toEqual([
      'unit-changed',
      'unit-changed',
    ]);
    for (const head of ['Sample ID,pH,P (ppm),K (ppm)', 'Sample ID,pH,P,K']) {
      expect(said(against(read(head, 'North,6.5,80,300'), ppm, '2025-04-01'))).toEqual(['factor-two', 'factor-two']);
      expect(said(against(read(head, 'North,6.5,44,161'), ppm, '2025-04-01'))).toEqual([]);
    }
  });
  it('5: the sample of one plot under a new name is asked about', () => {
    const before = read('Sample ID,pH,P (ppm)', 'N-1,6.5,40');
    const named = (name: string) =>
      against(read('Sample ID,pH,P (ppm)', `${name},6.6,41`), before, '2025-04-01').sample.map((doubt) => doubt.code);
    expect([named('North'), named('n 1'), named('The Long Bed')]).toEqual([['sample-renamed'], [], []]);
  });
  it('6: lb/acre of a potting mix is asked about', () => {
    const doubts = (density: string) => {
      const sample = of(read('Sample ID,pH,Density g/cm3,K (lb/A),Zn (ppm)', `Bench,6.5,${density},240,2`));
      const found = basisDoubts(sample.sampleId, sample.results);
      return sample.results.map((row) => found.get(row)?.map((doubt) => doubt.code));
    };
    expect(doubts('0.3')).toEqual([[], [], ['area-unit-light-soil'], []]);
    expect(doubts('1.1').flat()).toEqual([]);
  });
  it('7: nitrate per acre stays as printed, whichever factor the laboratory took for an inch', () => {
    // 10 ppm over 24 in: 0.30 an inch makes 72 lb/acre, 0.333 makes 80.
    for (const printed of ['72', '80']) {
      const sample = of(read('Sample ID,Depth,pH,NO3-N (ppm),NO3-N (lb/A)', `A,0-24 in,6.5,10,${printed}`));
      const acre = sample.results.find((row) => row.unit === 'lb/acre');
      expect(acre).toMatchObject({ analyte: 'nitrate_n', value: Number(printed), printed });
      expect(sample.results.flatMap((row) => row.doubts.map((doubt) => doubt.code))).not.toContain('two-readings');
    }
  });
  it('8: a base saturation that comes from pH and not from the bases is asked about', () => {
    const head = 'Sample ID,pH,CEC meq/100g,K meq/100g,Ca meq/100g,Mg meq/100g,Base Saturation %';
    const doubts = (line: string) =>
      [...basisDoubts(null, of(read(head, line)).results).values()].flat().map((doubt) => doubt.code);
    expect(doubts('A,6.5,12,0.4,5,1,85')).toEqual(['saturation-apart']);
    expect(doubts('A,6.5,12,0.4,8.6,1.2,85')).toEqual([]);
  });
  it('9: per cent of three bases is not taken for per cent of the exchange capacity without a question', () => {
    const head = 'Sample ID,pH,% K,% Ca,% Mg';
    const doubts = (line: string) =>
      [...basisDoubts(null, of(read(head, line)).results).values()].flat().map((doubt) => doubt.code);
    expect(doubts('A,5.8,5,75,20')).toEqual(['shares-of-bases', 'shares-of-bases', 'shares-of-bases']);
    expect(doubts('A,5.8,4,58,14')).toEqual([]);
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
