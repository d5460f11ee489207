import { describe, expect, it } from 'vitest';
import { typedLines, typedPage } from '@/tests/support/typedPage';
import { readPages } from '../readPages';
import { listRows } from './list';
import { isHeadingLine } from './runColumns';

function columns(text: string) {
  return listRows(typedLines(text), new Set()).runs[0]?.columns ?? [];
}
/** Each sample with the numbers taken for it. */
function samples(text: string) {
  return readPages({ fileName: 'typed.pdf', pages: [typedPage(text)] }).samples.map((sample) => ({
    name: sample.sampleId ?? sample.labNumber,
    values: sample.results.map((result) => result.value),
  }));
}

const DESIRED = `
Test             Your result     Desired
Soil pH          6.1             6.5
Phosphorus       38              50
Potassium        210             180
Calcium          1400            1600`;

const YEARS = `
Test             2022     2024     2026
Soil pH          5.9      6.1      6.4
Phosphorus       30       34       38
Potassium        180      190      210
Calcium          1200     1300     1400`;

const SAMPLES = `
Sample           Top bed      Low bed
Lab no.          101          102
Soil pH          6.1          6.4
Phosphorus       38           44
Potassium        210          240
Calcium          1400         1500`;

const REPEATED = `
                 Top bed              Low bed
Test             Found     Target     Found     Target
Soil pH          6.1       6.5        6.4       6.6
Phosphorus       38        50         44        52
Potassium        210       180        240       185
Calcium          1400      1600       1500      1650`;

describe('runColumns', () => {
  it('tells the desired from the found', () => {
    expect(columns(DESIRED).map((column) => column.role)).toEqual(['result', 'desired']);
    expect(samples(DESIRED).map((sample) => sample.values)).toEqual([[6.1, 38, 210, 1400]]);
  });
  it('keeps the year over each column, and the latest counts', () => {
    expect(columns(YEARS).map((column) => [column.role, column.day])).toEqual([
      ['date', '2022'],
      ['date', '2024'],
      ['date', '2026'],
    ]);
    expect(samples(YEARS).map((sample) => sample.values)).toEqual([[6.4, 38, 210, 1400]]);
  });
  it('gives each of the samples across the page its name and number', () => {
    expect(columns(SAMPLES).map((column) => column.identity)).toEqual([
      { sampleId: 'Top bed', labNumber: '101' },
      { sampleId: 'Low bed', labNumber: '102' },
    ]);
    expect(samples(SAMPLES)).toEqual([
      { name: 'Top bed', values: [6.1, 38, 210, 1400] },
      { name: 'Low bed', values: [6.4, 44, 240, 1500] },
    ]);
  });
  it('gives a name over found and target to both of them', () => {
    expect(columns(REPEATED).map((column) => [column.role, column.free])).toEqual([
      ['result', 'Top bed'],
      ['desired', 'Top bed'],
      ['result', 'Low bed'],
      ['desired', 'Low bed'],
    ]);
    expect(samples(REPEATED)).toEqual([
      { name: 'Top bed', values: [6.1, 38, 210, 1400] },
      { name: 'Low bed', values: [6.4, 44, 240, 1500] },
    ]);
  });
  it('reads the unit over a column, and words nobody knows as free', () => {
    const found = columns(`
Test             ppm       Marrow
Phosphorus       38        41
Potassium        210       190
Calcium          1400      1350`);
    expect(found.map((column) => [column.unit?.unit ?? null, column.free])).toEqual([
      ['mg/kg', null],
      [null, 'Marrow'],
    ]);
  });
});

describe('isHeadingLine', () => {
  const line = (text: string) => {
    const [first] = typedLines(text);
    return first !== undefined && isHeadingLine(first, { x0: 0, x1: 900 });
  };
  it('knows a line that only names columns', () => {
    expect(line('Test        Result      Unit')).toBe(true);
    expect(line('Test        Result      6.4')).toBe(false);
    expect(line('Top bed     Low bed     Long bed')).toBe(false);
    expect(line('Result')).toBe(false);
  });
});
