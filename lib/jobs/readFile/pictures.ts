import { readPages } from '@/lib/reading/readPages';
import { type AnyPage, readScanTraced, type TracedScan } from '@/lib/reading/scan/readScan';
import type { ScannedPage } from '@/lib/reading/scan/types';
import { type Page, type Reading, type Remark, refusedReading } from '@/lib/reading/types';
import { type Engine, openEngine } from '@/lib/services/ocr/engine';
import { readPicture, type SeenPage } from '@/lib/services/ocr/page';
import { picturesOfPdf } from '@/lib/services/pdf/pictures';
import { decodePicture } from '@/lib/services/pictures/decode';
import type { Grey } from '@/lib/services/pictures/types';
import { type RefusalCode, refusal } from '@/lib/services/reading/refusals';
import { FEW_WORDS, MAX_SCANNED_PAGES, NO_WORDS } from './limits';

/** What the reading process tells its parent on the way. */
export type Told = {
  /** So many pages are pictures: each may take its own time. */
  readonly scans: (pages: number) => void;
  readonly page: (page: number, of: number) => void;
};

function refused(input: { fileName: string; pages: number; code: RefusalCode }): TracedScan {
  const reading = refusedReading({ file: input.fileName, pages: input.pages, error: refusal(input.code) });
  return { reading, trace: null, level: reading };
}

/** Longer side of a sheet in points of paper, for a picture that does not say its size: a letter's. */
const USUAL_SIDE = 792;

function scannedPage(number: number, seen: SeenPage, side: number): ScannedPage {
  const { width, height, letter, views, pieces, stored } = seen;
  return { number, width, height, letter, views, pieces, stored, scale: seen.side / side };
}

/** Mean certainty of the words from which on a page counts as legible; print that nobody can read stays far below. */
const LEGIBLE = 0.6;

function isLegible(page: SeenPage): boolean {
  const words = page.views.flat();
  const letters = words.reduce((sum, word) => sum + word.text.length, 0);
  return words.reduce((sum, word) => sum + word.certainty * word.text.length, 0) > LEGIBLE * letters;
}

/** Nothing found on pages that cannot be made out is the picture's fault, and the grower is told so. */
function unlessBlurred(traced: TracedScan, pages: Iterable<SeenPage>): TracedScan {
  const { file, kind, pages: count } = traced.reading;
  if (kind !== 'refused' || [...pages].some(isLegible)) return traced;
  return refused({ fileName: file, pages: count, code: 'picture-unreadable' });
}

/** One engine for the file, opened when the first picture is there. */
async function withEngine<T>(run: (engine: () => Promise<Engine>) => Promise<T>): Promise<T> {
  let opened: Promise<Engine> | null = null;
  try {
    return await run(() => {
      opened ??= openEngine();
      return opened;
    });
  } finally {
    if (opened !== null) await (opened as Promise<Engine>).then((engine) => engine.close());
  }
}

/** A PNG or JPEG as a report of one page. */
export async function readPictureFile(input: { fileName: string; bytes: Uint8Array }, tell: Told): Promise<TracedScan> {
  const { fileName } = input;
  const decoded = await decodePicture(input.bytes);
  if (!decoded.ok) {
    return refused({ fileName, pages: 1, code: decoded.reason });
  }
  tell.scans(1);
  return withEngine(async (engine) => {
    const seen = await readPicture(await engine(), decoded.picture);
    tell.page(1, 1);
    if (seen === null) {
      return refused({ fileName, pages: 1, code: 'picture-unreadable' });
    }
    const traced = await readScanTraced({
      fileName,
      pages: [scannedPage(1, seen, USUAL_SIDE)],
      lookAgain: (_, spots, as) => seen.look(spots, as),
    });
    return unlessBlurred(traced, [seen]);
  });
}

function unread(numbers: readonly number[]): Remark {
  const which = numbers.length === 1 ? `Page ${numbers[0]} holds` : `Pages ${numbers.join(', ')} hold`;
  return {
    code: 'page-without-text',
    sentence: `${which} only a picture that could not be read. Compare with the page and type in what is missing.`,
  };
}

/** A PDF whose words are known, with its pages that are pictures read as well. Null when it has no such page. */
export async function readPicturesOfPdf(
  input: { fileName: string; bytes: Uint8Array; pages: readonly Page[] },
  tell: Told,
): Promise<TracedScan | null> {
  const bare = input.pages.filter((page) => page.words.length < NO_WORDS).map((page) => page.number);
  const perhaps = input.pages
    .filter((page) => page.words.length >= NO_WORDS && page.words.length < FEW_WORDS)
    .map((page) => page.number);
  if (bare.length === 0 && perhaps.length === 0) return null;
  const { fileName, bytes } = input;
  if (bare.length > MAX_SCANNED_PAGES && bare.length === input.pages.length) {
    return refused({ fileName, pages: input.pages.length, code: 'too-many-scans' });
  }
  const numbers = [...bare, ...perhaps].sort((a, b) => a - b).slice(0, MAX_SCANNED_PAGES);
  tell.scans(numbers.length);
  const seen = new Map<number, SeenPage>();
  return withEngine(async (engine) => {
    let drawn = 0;
    await picturesOfPdf({
      bytes,
      numbers: numbers.filter((number) => bare.includes(number)),
      perhaps: numbers.filter((number) => perhaps.includes(number)),
      onPicture: async (number: number, picture: Grey) => {
        drawn += 1;
        const page = await readPicture(await engine(), picture);
        if (page !== null) seen.set(number, page);
        tell.page(number, input.pages.length);
      },
    });
    // A page with few words and no picture over it is a page of text.
    if (drawn === 0 && bare.length === 0) return null;
    const pages = input.pages.map((page): AnyPage => {
      const picture = seen.get(page.number);
      return picture === undefined ? page : scannedPage(page.number, picture, Math.max(page.width, page.height));
    });
    const traced = await readScanTraced({
      fileName,
      pages,
      lookAgain: async (number, spots, as) => (await seen.get(number)?.look(spots, as)) ?? [],
    });
    const missed = bare.filter((number) => !seen.has(number));
    const warnings = traced.reading.warnings.filter((warning) => warning.code !== 'page-without-text');
    const told = missed.length > 0 ? [...warnings, unread(missed)] : warnings;
    const whole = { ...traced, reading: { ...traced.reading, warnings: told } };
    return bare.length === input.pages.length ? unlessBlurred(whole, seen.values()) : whole;
  });
}

/** All of a PDF: its words where it has them, its pictures where it has none. */
export async function readPdfPages(
  input: { fileName: string; bytes: Uint8Array; pages: readonly Page[] },
  tell: Told,
): Promise<Reading> {
  const pictured = await readPicturesOfPdf(input, tell);
  return pictured?.reading ?? readPages({ fileName: input.fileName, pages: input.pages });
}
