import { readFileSync } from 'node:fs';
import { basename, relative, sep } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { MAX_PAGES } from '@/lib/jobs/readFile/limits';
import { readPages } from '@/lib/reading/readPages';
import { readTable } from '@/lib/reading/readTable';
import type { Reading } from '@/lib/reading/types';
import { wordsOfPdf } from '@/lib/services/pdf/words';
import { compare, fixtures, REPORTS } from './compare';

/** The same steps as the reading process, without the process; refusals are tested through the process itself. */
async function read(path: string): Promise<Reading> {
  const bytes = new Uint8Array(readFileSync(path));
  const fileName = basename(path);
  if (path.endsWith('.csv') || path.endsWith('.tsv') || path.endsWith('.txt')) return readTable({ fileName, bytes });
  const words = await wordsOfPdf({ bytes, maxPages: MAX_PAGES });
  if (!words.ok) throw new Error(`${fileName}: ${words.reason}`);
  return readPages({ fileName, pages: words.pages });
}

const counts = { files: 0, cells: 0, right: 0, sure: 0, sureWrong: 0, extra: 0 };

describe('every printed report is read as its generator printed it', () => {
  // Pictures of pages and files without pages are read in ways of their own: scans.test.ts, dataFiles.test.ts.
  const elsewhere = ['scans', 'sheets', 'standard', 'pasted'].map((folder) => `${sep}${folder}${sep}`);
  const all = fixtures().filter(
    ({ expected, path }) => expected.kind !== 'refused' && !elsewhere.some((folder) => path.includes(folder)),
  );
  it('finds at least 12 PDF from 3 producers and 5 data files', () => {
    const producers = all.map((fixture) => fixture.expected.producer);
    expect(new Set(producers.filter((producer) => producer !== 'csv')).size).toBeGreaterThanOrEqual(3);
    expect(producers.filter((producer) => producer !== 'csv').length).toBeGreaterThanOrEqual(12);
    expect(producers.filter((producer) => producer === 'csv').length).toBeGreaterThanOrEqual(5);
  });
  it.each(all.map((fixture) => ({ name: relative(REPORTS, fixture.path), fixture })))('$name', async ({ fixture }) => {
    const found = compare(fixture.expected, await read(fixture.path));
    const cells = fixture.expected.samples.reduce((sum, sample) => sum + sample.results.length, 0);
    counts.files += 1;
    counts.cells += cells;
    counts.right += found.right;
    counts.sure += found.sure;
    counts.sureWrong += found.sureWrong;
    counts.extra += found.extra.length;
    expect({ wrong: found.wrong, missing: found.missing, extra: found.extra, other: found.other }).toEqual({
      wrong: [],
      missing: [],
      extra: [],
      other: [],
    });
    expect(found.right).toBe(cells);
  });
  afterAll(() => {
    console.info(
      `reading: ${counts.files} reports, ${counts.right} of ${counts.cells} cells right, ${counts.extra} taken that are no results; ` +
        `${counts.sure} cells at 0.95 or more, ${counts.sureWrong} of them wrong`,
    );
  });
});
