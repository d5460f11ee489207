import { readFileSync } from 'node:fs';
import { basename, join, relative } from 'node:path';
import { describe, expect, it } from 'vitest';
import { readFile } from '@/lib/jobs/readFile/readFile';
import { compare, fixtures, REPORTS } from './compare';

const load = (path: string) => ({ bytes: new Uint8Array(readFileSync(path)), fileName: basename(path) });
const sixPages = join(REPORTS, 'matrix', 'six-pages.pdf');

describe('the reading process', () => {
  const bad = fixtures().filter((fixture) => fixture.expected.kind !== 'soil');
  it.each(bad.map((fixture) => ({ name: relative(REPORTS, fixture.path), fixture })))(
    '$name gets its own code and sentence',
    async ({ fixture }) => {
      const reading = await readFile(load(fixture.path));
      expect(reading.kind).toBe(fixture.expected.kind);
      expect(reading.samples).toEqual([]);
      if (fixture.expected.kind === 'not-soil') {
        expect(reading.warnings.map((warning) => warning.code)).toContain('not-soil');
        return;
      }
      expect(reading.error?.code).toBe(fixture.expected.code);
      expect(reading.error?.sentence).toMatch(/^[A-Z].{20,}\.$/);
    },
  );

  it('reads a report and tells each page as it goes', async () => {
    const seen: string[] = [];
    const reading = await readFile({ ...load(sixPages), onPage: (page, of) => seen.push(`${page}/${of}`) });
    const expected = fixtures().find((fixture) => fixture.path === sixPages)?.expected;
    expect(expected === undefined ? null : compare(expected, reading).wrong).toEqual([]);
    expect(seen).toEqual(['1/6', '2/6', '3/6', '4/6', '5/6', '6/6']);
    expect(reading.pages).toBe(6);
  });

  it('is killed past its time, and the next file is read', async () => {
    const slow = await readFile({ ...load(sixPages), timeLimitMs: 1 });
    expect(slow.error?.code).toBe('too-slow');
    expect((await readFile(load(join(REPORTS, 'main-job', 'this-spring.csv')))).samples).toHaveLength(3);
  });

  it('is killed past its memory', async () => {
    const big = await readFile({ ...load(sixPages), memoryLimitBytes: 1024 });
    expect(big.error?.code).toBe('too-much-memory');
  });

  it('stops when told to', async () => {
    const stop = new AbortController();
    const reading = readFile({ ...load(sixPages), signal: stop.signal });
    stop.abort();
    await expect(reading).rejects.toThrow('Reading was stopped.');
  });

  it('refuses 21 MB without opening them', async () => {
    const bytes = new Uint8Array(21 * 1024 * 1024);
    bytes.set(new TextEncoder().encode('%PDF-1.7'));
    expect((await readFile({ bytes, fileName: 'large.pdf' })).error?.code).toBe('too-large');
  });
});
