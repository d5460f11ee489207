import { readFile } from 'node:fs/promises';
import sharp from 'sharp';
import { describe, expect, it } from 'vitest';
import type { Masked } from '@/lib/jobs/maskPage/messages';
import { runMask } from '@/lib/jobs/maskPage/runMask';
import { wordsOfPdf } from '@/lib/services/pdf/words';

const REPORTS = 'fixtures/reports';
const bytesOf = async (file: string) => new Uint8Array(await readFile(`${REPORTS}/${file}`));

async function masked(file: string): Promise<Masked> {
  const answer = await runMask({ fileName: file.split('/').at(-1) ?? '', bytes: await bytesOf(file), page: 1 });
  if (!answer.ok) throw new Error(answer.sentence);
  return answer;
}

/** Whose it is, as the fixture's own source has it: laboratory, address, telephone, grower, plots, numbers, days. */
const PRIVATE = [
  'Fennick',
  'Hollow',
  'Mill',
  'Race',
  '0142',
  'Onslow',
  'exhibition',
  'Wall',
  'F23057',
  '2025',
  'last-spring',
];

describe('a page blacked out in a process of its own', () => {
  it('shows the values and nothing of whose they are, in the picture and in the stages', async () => {
    const { picture, stages, kept, masked: gone } = await masked('main-job/last-spring.pdf');
    expect(PRIVATE.filter((word) => new RegExp(`\\b${word}`, 'i').test(stages))).toEqual([]);
    expect(['2295', '14.1', 'Mehlich', 'meq/100', '"cec"', '"12"'].filter((value) => !stages.includes(value))).toEqual(
      [],
    );
    expect(kept).toBeGreaterThan(60);
    expect(gone).toBeGreaterThan(30);

    const { data, info } = await sharp(picture).greyscale().raw().toBuffer({ resolveWithObject: true });
    const dark = (x: number, y: number) =>
      (data[Math.round(y * info.height) * info.width + Math.round(x * info.width)] ?? 255) < 60;
    const words = await wordsOfPdf({ bytes: await bytesOf('main-job/last-spring.pdf'), maxPages: 5 });
    if (!words.ok) throw new Error('The fixture has no words.');
    const placed = words.pages[0]?.words ?? [];
    const spots = ({ x0, x1, y0, y1 }: (typeof placed)[number]) =>
      [0.1, 0.3, 0.5, 0.7, 0.9].flatMap((a) =>
        [0.2, 0.5, 0.8].map((b) => [x0 + a * (x1 - x0), y0 + b * (y1 - y0)] as const),
      );
    const secret = placed.filter((word) => PRIVATE.some((one) => word.text.includes(one)));
    expect(secret.length).toBeGreaterThan(8);
    for (const word of secret)
      expect(
        spots(word).every(([x, y]) => dark(x, y)),
        word.text,
      ).toBe(true);
    const value = placed.find((word) => word.text === '2295');
    if (!value) throw new Error('The value is missing.');
    const ink = spots(value).filter(([x, y]) => dark(x, y)).length;
    expect(ink).toBeLessThan(spots(value).length);
  }, 60_000);

  it('does the same for a photograph, from the words that were seen on it', async () => {
    const { stages, kept } = await masked('scans/rows-150.jpg');
    expect(['Ashmere', 'Pumpkin', 'hill'].filter((word) => stages.includes(word))).toEqual([]);
    expect(['2800', '250'].filter((value) => !stages.includes(value))).toEqual([]);
    expect(kept).toBeGreaterThan(20);
  }, 120_000);

  it('is stopped past its time, and says so', async () => {
    const bytes = await bytesOf('main-job/last-spring.pdf');
    const answer = await runMask({ fileName: 'a.pdf', bytes, page: 1 }, { timeLimitMs: 1 });
    expect(answer).toMatchObject({ ok: false, sentence: expect.stringContaining('was stopped') });
  }, 60_000);

  it('makes no copy of what has no page, and says why', async () => {
    const data = await runMask({ fileName: 'x.csv', bytes: await bytesOf('main-job/this-spring.csv'), page: 1 });
    expect(data).toMatchObject({ ok: false, sentence: expect.stringContaining('of pages of a PDF and of pictures') });
    const cut = await runMask({ fileName: 'x.pdf', bytes: new TextEncoder().encode('%PDF-1.4 cut off'), page: 1 });
    expect(cut).toMatchObject({ ok: false, sentence: expect.stringMatching(/\.$/) });
  }, 60_000);
});
