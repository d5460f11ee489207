import { readFileSync } from 'node:fs';
import { basename, join, relative, sep } from 'node:path';
import sharp from 'sharp';
import { afterAll, describe, expect, it } from 'vitest';
import { readFile } from '@/lib/jobs/readFile/readFile';
import { compare, fixtures, REPORTS } from './compare';

const load = (path: string) => ({ bytes: new Uint8Array(readFileSync(path)), fileName: basename(path) });
const counts = { pages: 0, cells: 0, right: 0, extra: 0, sure: 0, sureWrong: 0, ms: [] as number[] };

/** Cells of which every part but the blanks between its characters is right. */
function wrongBeyondBlanks(problems: readonly string[]): string[] {
  return problems.filter((problem) => {
    const match = /: \S+ printed (.+) for (.+)$/.exec(problem);
    return match === null || match[1]?.replaceAll(' ', '') !== match[2]?.replaceAll(' ', '');
  });
}

describe('a scan or photograph is read as the page it was made of', () => {
  const all = fixtures().filter((fixture) => fixture.path.includes(`${sep}scans${sep}`));
  it('finds scans, photographs and a page behind a letter', () => {
    expect(all.filter(({ path }) => path.endsWith('.pdf')).length).toBeGreaterThanOrEqual(4);
    expect(all.filter(({ path }) => /\.(jpg|png)$/.test(path)).length).toBeGreaterThanOrEqual(4);
  });

  it.each(all.map((fixture) => ({ name: relative(REPORTS, fixture.path), fixture })))(
    '$name',
    async ({ fixture }) => {
      const began = performance.now();
      const reading = await readFile(load(fixture.path));
      counts.ms.push(performance.now() - began);
      const found = compare(fixture.expected, reading);
      const cells = fixture.expected.samples.reduce((sum, sample) => sum + sample.results.length, 0);
      counts.pages += 1;
      counts.cells += cells;
      counts.right += found.right;
      counts.extra += found.extra.length;
      counts.sure += found.sure;
      counts.sureWrong += found.sureWrong;
      expect({ wrong: wrongBeyondBlanks(found.wrong), missing: found.missing, extra: found.extra }).toEqual({
        wrong: [],
        missing: [],
        extra: [],
      });
      expect(reading.samples.map((sample) => sample.sampleId)).toEqual(
        fixture.expected.samples.map((sample) => sample.sampleId),
      );
    },
    60_000,
  );

  afterAll(() => {
    const sorted = counts.ms.sort((a, b) => a - b);
    console.info(
      `scans: ${counts.pages} pages, ${counts.right} of ${counts.cells} cells right, ${counts.extra} extra; ` +
        `${counts.sure} at 0.95 or more, ${counts.sureWrong} of them wrong; ` +
        `median ${Math.round(sorted[Math.floor(sorted.length / 2)] ?? 0)} ms a page`,
    );
  });
});

describe('what a scan can lose is doubted, not guessed', () => {
  it('tells a page without print from a page without results', async () => {
    const blank = await sharp({ create: { width: 1200, height: 1500, channels: 3, background: '#f4f1ea' } })
      .png()
      .toBuffer();
    const reading = await readFile({ bytes: new Uint8Array(blank), fileName: 'blank.png' });
    expect(reading.error?.code).toBe('picture-unreadable');
    expect(reading.samples).toEqual([]);
  }, 60_000);

  it('gives a photograph that is stored turned its boxes on the picture as a person sees it', async () => {
    const path = join(REPORTS, 'scans', 'terraces-turned-photo.jpg');
    const stored = await sharp(path).metadata();
    expect(stored.orientation).toBe(6);
    expect(stored.width).toBeGreaterThan(stored.height);
    const reading = await readFile(load(path));
    const acidity = reading.samples[0]?.results.find((result) => result.analyte === 'soil_ph_water');
    const expected = fixtures().find((fixture) => fixture.path === path)?.expected.samples[0]?.results[0];
    // Without the turn the number would stand at another corner of the picture.
    expect(acidity?.box?.[0]).toBeCloseTo(expected?.box?.[0] ?? -1, 1);
    expect(acidity?.box?.[1]).toBeCloseTo(expected?.box?.[1] ?? -1, 1);
  }, 60_000);

  it('tells its parent how long a scan may take: the text limit alone would stop it', async () => {
    const path = join(REPORTS, 'scans', 'tiny-type-200.png');
    const reading = await readFile({ ...load(path), timeLimitMs: 3000 });
    expect(reading.kind).toBe('soil');
  }, 60_000);
});
