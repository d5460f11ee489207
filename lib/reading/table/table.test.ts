import { describe, expect, it } from 'vitest';
import { readTable, readTableTraced } from '../readTable';
import { adviceInWords, adviceItem } from './advice';
import { readTableCell } from './cell';
import { decode } from './decode';
import { dateText, depthText, fieldOf } from './fields';
import { gridOf } from './grid';
import { yearIn } from './headingRole';
import { isNoSample, isSummary } from './names';
import { labelOf } from './spoken';

const POINT = { decimalComma: false };

describe('headings of data files', () => {
  it.each([
    ['P_lbs_ac', 'phosphorus', 'lb/acre', null],
    ['K_ppm', 'potassium', 'mg/kg', null],
    ['ph', 'soil_ph_water', null, null],
    ['pH_1to1', 'soil_ph_water', null, '1:1_water'],
    ['BufferpH', 'buffer_ph', null, null],
    ['Ca % sat', 'sat_ca', '%', null],
    ['CaSat_pct', 'sat_ca', '%', null],
    ['base_sat_mg_pct', 'sat_mg', '%', null],
    ['P (M3) ppm', 'phosphorus', 'mg/kg', 'M3_ICP'],
    ['Mehlich3_K', 'potassium', null, 'M3'],
    ['P_Bray1_ppm', 'phosphorus', 'mg/kg', 'Bray1'],
    ['CEC_meq100g', 'cec', 'meq/100g', null],
    ['mg_ppm', 'magnesium', 'mg/kg', null],
    ['Mg mg/kg', 'magnesium', 'mg/kg', null],
    ['S_KCl40_mg_kg', 'sulfur', 'mg/kg', 'KCl40'],
    ['pH-Wert', 'soil_ph_water', null, null],
  ])('%s', (text, analyte, unit, method) => {
    expect(labelOf(text)).toMatchObject({ analyte, unit, method, text });
  });
  it.each(['Sample', 'Notes', 'Acres', 'Yield goal', 'Address 1', ''])('"%s" names no analyte', (text) => {
    expect(labelOf(text)).toBeNull();
  });
  it.each([
    ['SAMPLE_ID', 'sampleId'],
    ['LabNo', 'labNumber'],
    ['Date Collected', 'dateSampled'],
    ['DateReported', 'dateReported'],
    ['DepthTop_in', 'depthTop'],
    ['To (cm)', 'depthBottom'],
    ['Received', 'other'],
    ['Potassium', null],
    ['Result', null],
  ])('%s identifies %s', (text, field) => {
    expect(fieldOf(text)).toBe(field);
  });
  it('finds the year of a column, and none in a number or a whole date', () => {
    expect(yearIn('pH 2022')).toBe(2022);
    expect(yearIn('2024-10')).toBeGreaterThan(yearIn('2024-03') ?? 0);
    expect(yearIn('Fall 2024')).toBeGreaterThan(yearIn('Spring 2024') ?? 0);
    expect(yearIn('2024-10-12')).toBeNull();
    expect(yearIn('lb/2000')).toBeNull();
  });
});

describe('cells of data files', () => {
  it.each([
    ["1'204", 1204, '='],
    ['1.2E+03', 1200, '='],
    ['<0.1', 0.1, '<'],
    ['0.1<', 0.1, '<'],
    ['below 0.1', 0.1, '<'],
    ['ND (<0.02)', 0.02, 'nd'],
    ['BDL', null, 'nd'],
    ['>2000', 2000, '>'],
    ['12.5 J', 12.5, '='],
    ['~34', 34, '='],
    ['6.5 ± 0.1', 6.5, '='],
  ])('%s', (text, value, qualifier) => {
    expect(readTableCell(text, POINT)).toMatchObject({ kind: 'value', value, qualifier });
  });
  it.each(['--', 'NT', 'n/a', ''])('"%s" is not analysed', (text) => {
    expect(readTableCell(text, POINT).kind).toBe('none');
  });
  it.each(['6.0-7.0', '2024-10-02', 'sandy loam', 'yes'])('"%s" is no number', (text) => {
    expect(readTableCell(text, POINT).kind).not.toBe('value');
  });
});

describe('days and depths', () => {
  it('reads packed days and the day numbers of spreadsheets', () => {
    expect(dateText('20241012')).toBe('2024-10-12');
    // 45580 is 15 October 2024 in the 1900 calendar of spreadsheets (ECMA-376, 18.17.4.1).
    expect(dateText('45580')).toBe('2024-10-15');
    expect(dateText('10/12/2024')).toBe('10/12/2024');
    expect(dateText('2.10.2024')).toBe('2024-10-02');
  });
  it('keeps the words of the file beside the day', () => {
    const [sample] = readTable({
      fileName: 'a.csv',
      text: 'Sample,Date sampled,pH,P ppm\nA,20241012,6.4,33\n',
    }).samples;
    expect(sample).toMatchObject({ dateSampled: '2024-10-12', dateSampledPrinted: '20241012' });
  });
  it('takes the unit of a depth from cell or heading, and gives none of its own', () => {
    expect(depthText('0-6', 'Depth (in)')).toBe('0-6 in');
    expect(depthText('0-15cm', 'Depth')).toBe('0-15 cm');
    expect(depthText('0-150', 'depth_mm')).toBe('0-15 cm');
    expect(depthText('0-6', 'Depth')).toBe('0-6');
  });
});

describe('rows that are no samples', () => {
  it.each([
    'Average',
    'Farm average',
    'Std. dev.',
    'Optimum range',
    'Reporting limit',
    'QC check soil',
    'Method blank',
    'Change from 2023',
    'Limit of reporting',
  ])('%s', (name) => {
    expect(isNoSample(name, {})).toBe(true);
  });
  it.each(['North bed', 'Low field', 'Highgate', 'Lastingham', 'Control plot', 'Minster', 'Rangewood'])(
    '%s is a sample',
    (name) => {
      expect(isNoSample(name, {})).toBe(false);
    },
  );
  it('lets a row with a laboratory number of its own be a sample, whatever it is called', () => {
    expect(isNoSample('Target', { labNumber: '4411' })).toBe(false);
  });
  it('knows a nameless row of sums or means by its numbers', () => {
    const above = [
      [6.5, 40],
      [6.7, 60],
    ];
    expect(isSummary([6.6, 50], above)).toBe(true);
    expect(isSummary([6.7, 60], above)).toBe(true);
    expect(isSummary([6.9, 12], above)).toBe(false);
  });
});

describe('advice in a data file', () => {
  it('is named without its unit and the words of its role', () => {
    expect(adviceItem('Lime Rec (lb/ac)')).toBe('Lime');
    expect(adviceItem('K2O to apply kg/ha')).toBe('K2O');
  });
  it('is read out of a cell of words', () => {
    expect(adviceInWords('Lime 40 lb/1000 sq ft', 'A', 'pH')).toMatchObject({
      item: 'Lime',
      amount: 40,
      unit: 'lb/1000ft2',
      sampleId: 'A',
    });
    expect(adviceInWords('none needed', 'A', 'pH')).toBeNull();
  });
});

describe('encodings and signs between cells', () => {
  const table = 'Probe;pH;P mg/kg\nWäldchen;6,4;22,1\n';
  it.each([
    ['UTF-8 with a mark', Buffer.from(`\ufeff${table}`, 'utf8')],
    ['UTF-16 little end first', Buffer.concat([Buffer.from([0xff, 0xfe]), Buffer.from(table, 'utf16le')])],
    ['UTF-16 big end first', Buffer.concat([Buffer.from([0xff, 0xfe]), Buffer.from(table, 'utf16le')]).swap16()],
    ['UTF-16 without a mark', Buffer.from(table, 'utf16le')],
    ['Windows-1252', Buffer.from(table, 'latin1')],
    ['line ends of old computers', Buffer.from(table.replace(/\n/g, '\r'), 'utf8')],
  ])('%s', (_name, bytes) => {
    const [sample] = readTable({ fileName: 'a.csv', bytes: new Uint8Array(bytes) }).samples;
    expect(sample?.sampleId).toBe('Wäldchen');
    expect(sample?.results.map((result) => result.value)).toEqual([6.4, 22.1]);
  });
  it('refuses bytes that are no text', () => {
    expect(decode(Uint8Array.from([1, 2, 0, 0, 4, 0, 0, 0, 9])).ok).toBe(false);
  });
  it('is not misled by decimal commas', () => {
    expect(gridOf('Sample;pH;P ppm\nA;6,4;3,3\nB;6,1;2,2\n').delimiter).toBe(';');
    expect(gridOf('sep=|\nSample|pH|P ppm\nA, east|6.4|33\n').delimiter).toBe('|');
  });
});

describe('what one file can hold', () => {
  it('keeps a unit and a method that the file does not give empty, with doubts', () => {
    const [sample] = readTable({ fileName: 'a.csv', text: 'Sample,pH,P\nA,6.4,33\n' }).samples;
    expect(sample?.results[1]).toMatchObject({ analyte: 'phosphorus', unit: null, method: null });
    expect(sample?.results[1]?.doubts.map((doubt) => doubt.code)).toEqual(['unit-missing', 'method-missing']);
  });
  it('keeps depths of one place apart', () => {
    const { samples } = readTable({
      fileName: 'a.csv',
      text: 'Sample,Depth (in),pH,P ppm\nA,0-6,6.4,33\nA,6-12,6.1,20\n',
    });
    expect(samples.map((sample) => sample.depth)).toEqual([
      { top: 0, bottom: 6, unit: 'in' },
      { top: 6, bottom: 12, unit: 'in' },
    ]);
  });
  it('takes names and days from a list of samples beside the numbers', () => {
    const list = 'Lab No,Sample ID,Date sampled\n1,North,2024-05-01\n2,South,2024-05-02\n';
    const sheets = [list, 'Lab No,pH,P ppm\n1,6.4,33\n2,6.9,20\n'].map((text, at) => ({
      number: at + 1,
      name: null,
      grid: text
        .trim()
        .split('\n')
        .map((line) => line.split(',')),
      merges: [],
    }));
    const { samples } = readTable({ fileName: 'a.xlsx', sheets });
    expect(samples.map((sample) => [sample.labNumber, sample.sampleId, sample.dateSampled])).toEqual([
      ['1', 'North', '2024-05-01'],
      ['2', 'South', '2024-05-02'],
    ]);
    expect(samples[0]?.results[0]?.cell).toEqual({ sheet: 2, row: 2, column: 2 });
  });
  it('takes one year of several, and says why the others are left', () => {
    const { reading, trace } = readTableTraced({
      fileName: 'a.csv',
      text: 'Sample,pH 2021,pH 2024,P ppm 2021,P ppm 2024\nA,6.1,6.4,20,33\n',
    });
    expect(reading.samples[0]?.results.map((result) => result.printed)).toEqual(['6.4', '33']);
    expect(trace?.untaken.map((one) => [one.text, one.why])).toEqual([
      ['6.1', 'previous'],
      ['20', 'previous'],
    ]);
  });
  it('never changes a prototype by a heading', () => {
    readTable({ fileName: 'a.csv', text: '__proto__,constructor,pH,P ppm\nx,y,6.4,33\n' });
    expect(Object.hasOwn(Object.prototype, 'x')).toBe(false);
  });
});
