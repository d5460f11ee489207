import { describe, expect, it } from 'vitest';
import { applyMapping, type OwnMapping, type OwnRows, proposeMapping, TYPED_BY_GROWER } from '.';

const sheet = (...rows: string[][]): OwnRows => ({ number: 1, name: null, rows });

const WIDE = sheet(
  ['My soil tests'],
  [],
  ['Plot', 'Date', 'Lab', 'Depth (in)', 'pH 1:1', 'P Mehlich 3 ppm', 'K ppm', 'OM %', 'Notes'],
  ['Leek trench', '2021-10-03', 'Fennick', '0-6', '6.1', '33', '120', '4.0', 'wet'],
  ['Leek trench', '2023-10-01', 'Fennick', '0-6', '6.4', '<2', 'lots', '4.2', ''],
  ['Average', '', '', '', '6.2', '18', '120', '4.1', ''],
  ['', '3/4/2022', 'Fennick', '6', '6.9', '21', '', '', ''],
);

const LONG = sheet(
  ['Bed', 'Sampled on', 'Test', 'Result', 'Unit', 'Method'],
  ['North', '12 May 2020', 'pH', '6.5', '', '1:1 water'],
  ['North', '12 May 2020', 'Phosphorus', '31', 'ppm', 'Olsen'],
  ['North', '12 May 2020', 'Phosphorus', '31', 'ppm', 'Olsen'],
  ['North', '12 May 2020', 'Worms', '14', 'each', ''],
  ['South', '12 May 2020', 'Potassium', '2.1', 'buckets', 'guesswork'],
);

function proposed(rows: OwnRows): OwnMapping {
  const answer = proposeMapping([rows]);
  if (!answer.ok) throw new Error(answer.reason);
  return answer.mapping;
}

describe('proposeMapping', () => {
  it('names the columns of a sheet with one row a sample', () => {
    const mapping = proposed(WIDE);
    expect(mapping).toMatchObject({ layout: 'sample-per-row', sheet: 1, headingRow: 3, decimalComma: false });
    expect(mapping.columns.map((column) => column.meaning)).toEqual([
      { kind: 'sample-name' },
      { kind: 'date-sampled' },
      { kind: 'laboratory' },
      { kind: 'depth', unit: 'in' },
      { kind: 'result', analyte: 'soil_ph_water', unit: null, form: null, method: '1:1_water' },
      { kind: 'result', analyte: 'phosphorus', unit: 'mg/kg', form: 'element', method: 'M3_ICP' },
      { kind: 'result', analyte: 'potassium', unit: 'mg/kg', form: 'element', method: null },
      { kind: 'result', analyte: 'organic_matter', unit: '%', form: null, method: null },
      { kind: 'skip' },
    ]);
    expect(mapping.columns[0]?.examples).toContain('Leek trench');
  });
  it('names the columns of a sheet with one row a number', () => {
    const mapping = proposed(LONG);
    expect(mapping.layout).toBe('number-per-row');
    expect(mapping.columns.map((column) => column.meaning.kind)).toEqual([
      'sample-name',
      'date-sampled',
      'analyte',
      'value',
      'unit',
      'method',
    ]);
  });
  it('says when there is nothing to name', () => {
    expect(proposeMapping([sheet([])])).toEqual({ ok: false, reason: 'no-rows' });
    expect(proposeMapping([sheet(['Name', 'Street'], ['R. Onslow', '12 Mill Race'])])).toEqual({
      ok: false,
      reason: 'no-results',
    });
  });
  it('says what a person has to choose', () => {
    const answer = proposeMapping([sheet(['Plot', 'pH', 'P'], ['A', '6.5', '30'], ['B', '6.6', '31'])]);
    expect(answer.ok ? answer.doubts.map((doubt) => doubt.code) : []).toEqual(['no-date-column', 'unit-missing']);
  });
});

describe('applyMapping', () => {
  it('marks every row as typed by the grower and keeps its cell', () => {
    const { reading, counts } = applyMapping({ fileName: 'own.csv', sheet: WIDE, mapping: proposed(WIDE) });
    expect(counts).toEqual({ rows: 3, samples: 3, results: 9, leftOut: 1 });
    expect(reading.lab.name).toBe('Fennick');
    const [first, second] = reading.samples;
    expect(first).toMatchObject({
      sampleId: 'Leek trench',
      dateSampled: '2021-10-03',
      depth: { top: 0, bottom: 6, unit: 'in' },
    });
    expect(
      first?.results.map((result) => [
        result.analyte,
        result.value,
        result.unit,
        result.cell?.row,
        result.cell?.column,
      ]),
    ).toEqual([
      ['soil_ph_water', 6.1, 'pH', 4, 5],
      ['phosphorus', 33, 'mg/kg', 4, 6],
      ['potassium', 120, 'mg/kg', 4, 7],
      ['organic_matter', 4, '%', 4, 8],
    ]);
    expect(second?.results[1]).toMatchObject({ printed: '<2', value: 2, qualifier: '<' });
    expect(
      reading.samples.flatMap((sample) => sample.results).every((result) => result.doubts.includes(TYPED_BY_GROWER)),
    ).toBe(true);
  });
  it('gives each row its problems and loses no row silently', () => {
    const { problems } = applyMapping({ fileName: 'own.csv', sheet: WIDE, mapping: proposed(WIDE) });
    expect(problems.map((problem) => [problem.row, problem.column, problem.code, problem.leftOut])).toEqual([
      [5, 7, 'not-a-number', true],
      [7, 2, 'date-ambiguous', false],
      [7, 1, 'name-missing', false],
    ]);
    expect(problems.every((problem) => /^[A-Z"].{10,}\.$/.test(problem.sentence))).toBe(true);
  });
  it('reads a doubtful day in the order that the person chose', () => {
    const { reading } = applyMapping({
      fileName: 'own.csv',
      sheet: WIDE,
      mapping: { ...proposed(WIDE), dateOrder: 'day-first' },
    });
    expect(reading.samples[2]?.dateSampled).toBe('2022-04-03');
  });
  it('gathers one number a row into samples', () => {
    const { reading, problems } = applyMapping({ fileName: 'own.csv', sheet: LONG, mapping: proposed(LONG) });
    expect(reading.samples.map((sample) => [sample.sampleId, sample.results.length])).toEqual([
      ['North', 2],
      ['South', 1],
    ]);
    expect(reading.samples[0]?.results[1]).toMatchObject({ analyte: 'phosphorus', unit: 'mg/kg', method: 'Olsen' });
    expect(reading.samples[1]?.results[0]).toMatchObject({
      analyte: 'potassium',
      value: 2.1,
      unit: null,
      method: null,
    });
    expect(problems.map((problem) => [problem.row, problem.code])).toEqual([
      [5, 'analyte-unknown'],
      [6, 'unit-unknown'],
      [6, 'method-unknown'],
      [4, 'row-twice'],
    ]);
  });
});
