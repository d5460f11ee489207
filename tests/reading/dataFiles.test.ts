import { readdirSync, readFileSync } from 'node:fs';
import { basename, join, relative } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { readDataFile } from '@/lib/jobs/readFile/dataFile';
import { isDataKind } from '@/lib/jobs/readFile/messages';
import { readTableTraced } from '@/lib/reading/readTable';
import type { Reading } from '@/lib/reading/types';
import { sniffReport } from '@/lib/services/reading/sniff';
import { compare, type Fixture, REPORTS } from './compare';

const FOLDERS = ['data-files', 'sheets', 'standard', 'pasted'].map((name) => join(REPORTS, name));
/** Made by other hands, who did not know the reader. */
const SECOND_HAND = join(REPORTS, '..', 'second-hand', 'data');

function inFolder(folder: string): Fixture[] {
  return readdirSync(folder)
    .filter((name) => name.endsWith('.expected.json'))
    .map((name) => {
      const expected: Fixture['expected'] = JSON.parse(readFileSync(join(folder, name), 'utf8'));
      return { path: join(folder, basename(expected.file)), expected };
    });
}

async function read(path: string): Promise<Reading> {
  const bytes = new Uint8Array(readFileSync(path));
  const fileName = basename(path);
  const sniffed = sniffReport({ bytes, fileName });
  if (!sniffed.ok || !isDataKind(sniffed.kind)) throw new Error(`${fileName} is no data file`);
  return (await readDataFile({ kind: sniffed.kind, fileName, bytes })).reading;
}

const counts = { files: 0, cells: 0, right: 0, taken: 0, sure: 0, sureWrong: 0 };
const named = (files: readonly Fixture[]) =>
  files.map((fixture) => ({ name: relative(REPORTS, fixture.path), fixture }));

describe('data files, sheets, texts and the open standard', () => {
  const own = FOLDERS.flatMap(inFolder);
  it('come in at least 15 dialects of data files, 4 workbooks, 4 texts and 4 files of the standard', () => {
    const inside = (folder: string) => own.filter((fixture) => fixture.path.startsWith(join(REPORTS, folder))).length;
    expect(inside('data-files')).toBeGreaterThanOrEqual(15);
    expect(inside('sheets')).toBeGreaterThanOrEqual(4);
    expect(inside('pasted')).toBeGreaterThanOrEqual(4);
    expect(inside('standard')).toBeGreaterThanOrEqual(4);
  });
  it.each(named(own))('$name is read as it was made', async ({ fixture }) => {
    const { right, wrong, missing, extra, other } = compare(fixture.expected, await read(fixture.path));
    expect({ wrong, missing, extra, other }).toEqual({ wrong: [], missing: [], extra: [], other: [] });
    expect(right).toBe(fixture.expected.samples.reduce((sum, sample) => sum + sample.results.length, 0));
  });
  it.each(named(inFolder(SECOND_HAND)))(
    '$name: every number right, none taken that is no result',
    async ({ fixture }) => {
      const reading = await read(fixture.path);
      const found = compare(fixture.expected, reading);
      const cells = fixture.expected.samples.reduce((sum, sample) => sum + sample.results.length, 0);
      counts.files += 1;
      counts.cells += cells;
      counts.right += found.right;
      counts.taken += reading.samples.reduce((sum, sample) => sum + sample.results.length, 0);
      counts.sure += found.sure;
      counts.sureWrong += found.sureWrong;
      expect({ wrong: found.wrong, missing: found.missing, extra: found.extra }).toEqual({
        wrong: [],
        missing: [],
        extra: [],
      });
      expect(found.right).toBe(cells);
    },
  );
  afterAll(() => {
    console.info(
      `data files by other hands: ${counts.files}, ${counts.right} of ${counts.cells} cells right, ${counts.taken} taken; ` +
        `${counts.sure} cells at 0.95 or more, ${counts.sureWrong} of them wrong`,
    );
  });
});

describe('the trace of a data file', () => {
  const trace = (...lines: string[]) =>
    readTableTraced({ fileName: 'a.csv', text: lines.join('\n') }).trace?.untaken ?? [];
  it('says of every number that is no result why it is none', () => {
    const untaken = trace(
      'Account,7781',
      'Sample ID,Depth cm,pH,P ppm,P desired,P previous,P RL,Lime t/ha,Plot no. of trees',
      'North,15,6.5,33,50,31,1,2.5,4',
      'South,15,6.6,30,50,29,1,0,6',
      'Average,,6.55,31.5,,,,,',
    );
    expect(untaken.filter((one) => one.row === 3).map((one) => [one.column, one.text, one.why])).toEqual([
      [2, '15', 'depth'],
      [5, '50', 'desired'],
      [6, '31', 'previous'],
      [7, '1', 'limit'],
      [8, '2.5', 'recommendation'],
      [9, '4', 'column-without-analyte'],
    ]);
    expect(untaken.filter((one) => one.row === 5).map((one) => one.why)).toEqual(['summary-row', 'summary-row']);
    expect(untaken.find((one) => one.row === 1)).toMatchObject({ text: '7781', why: 'outside-table' });
  });
});

describe('limits of data files', () => {
  const wide = (columns: number) => `Sample ID,pH,P ppm${',x'.repeat(columns - 3)}\nA,6.5,33\n`;
  const long = (rows: number) => `Sample ID,pH,P ppm\n${'A,6.5,33\n'.repeat(rows - 1)}`;
  const code = (text: string) => readTableTraced({ fileName: 'a.csv', text }).reading.error?.code ?? null;
  it('takes 1,000 columns and 20,000 rows, and no more', () => {
    expect(code(wide(1_000))).toBeNull();
    expect(code(wide(1_001))).toBe('table-too-large');
    expect(code(long(20_001))).toBe('table-too-large');
  });
  it('reads 20,000 rows of their own in less than the time that a file has', () => {
    const rows = Array.from({ length: 19_999 }, (_, at) => `Bag ${at},${(5 + (at % 30) / 10).toFixed(1)},${at % 90}`);
    const start = performance.now();
    const { reading } = readTableTraced({ fileName: 'a.csv', text: ['Sample ID,pH,P ppm', ...rows].join('\n') });
    expect(reading.samples).toHaveLength(19_999);
    expect(performance.now() - start).toBeLessThan(15_000);
  });
});
