import { createRequire } from 'node:module';
import { dirname, join } from 'node:path';
import { unpacksTooLarge } from './bombs';
import type { PdfPage, PdfWord } from './types';
import { relativeWidth } from './widths';

export type PdfRefusal =
  | 'not-a-pdf'
  | 'empty'
  | 'encrypted'
  | 'truncated'
  | 'broken'
  | 'too-many-pages'
  | 'pdf-unpacks-too-large';

export type PdfWords =
  | { readonly ok: true; readonly pages: readonly PdfPage[]; readonly pagesWithText: number }
  | { readonly ok: false; readonly reason: PdfRefusal; readonly pages: number };

type TextRun = {
  readonly str: string;
  readonly transform: readonly number[];
  readonly width: number;
  readonly fontName: string;
};

type Frame = { readonly left: number; readonly top: number; readonly width: number; readonly height: number };

/** Share of the type size above and below the baseline that a word's box covers: figures and capitals, no more. */
const ABOVE = 0.74;
const BELOW = 0.06;

/** True when the bytes begin like a PDF; a little rubbish before the mark is common and harmless. */
export function looksLikePdf(bytes: Uint8Array): boolean {
  return Buffer.from(bytes.subarray(0, 1024)).includes('%PDF-');
}

function isCutOff(bytes: Uint8Array): boolean {
  const tail = Buffer.from(bytes.subarray(Math.max(0, bytes.length - 8192)));
  return !tail.includes('%%EOF') && !tail.includes('startxref');
}

function assets(): { fonts: string; maps: string } {
  const root = dirname(createRequire(import.meta.url).resolve('pdfjs-dist/package.json'));
  return { fonts: `${join(root, 'standard_fonts')}/`, maps: `${join(root, 'cmaps')}/` };
}

function directionOf(a: number, b: number): 0 | 90 | 180 | 270 {
  if (Math.abs(a) >= Math.abs(b)) return a >= 0 ? 0 : 180;
  return b > 0 ? 270 : 90;
}

/** The words of one run, each with its share of the run's width. */
function* splitRun(run: TextRun, even: boolean): Generator<{ text: string; from: number; to: number }> {
  const characters = [...run.str];
  const advances = characters.map((character) => relativeWidth(character, even));
  const total = advances.reduce((sum, advance) => sum + advance, 0) || 1;
  let at = 0;
  let start = 0;
  let text = '';
  for (const [index, character] of characters.entries()) {
    const next = at + (advances[index] ?? 0);
    if (/\s/.test(character)) {
      if (text !== '') yield { text, from: start / total, to: at / total };
      text = '';
    } else {
      if (text === '') start = at;
      text += character;
    }
    at = next;
  }
  if (text !== '') yield { text, from: start / total, to: at / total };
}

/** Sine of the angle from which text counts as neither level nor upright; a crooked scan's text layer is below it. */
const ASLANT = 0.15;

/** Largest word, in pages; largest page, in points. */
const LARGEST = 4;
const LARGEST_PAGE = 1e9;

function placeRun(run: TextRun, frame: Frame, even: boolean): PdfWord[] {
  const [a = 1, b = 0, c = 0, d = 1, e = 0, f = 0] = run.transform;
  const size = Math.hypot(c, d) || Math.hypot(a, b);
  const length = Math.hypot(a, b) || 1;
  const [ux, uy] = [a / length, b / length];
  // Text across the page is a watermark or a stamp; its box would cover what lies under it.
  if (Math.min(Math.abs(ux), Math.abs(uy)) > ASLANT) return [];
  const [nx, ny] = [-uy, ux];
  const words: PdfWord[] = [];
  for (const part of splitRun(run, even)) {
    const xs: number[] = [];
    const ys: number[] = [];
    for (const along of [part.from * run.width, part.to * run.width]) {
      for (const across of [-BELOW * size, ABOVE * size]) {
        xs.push((e + ux * along + nx * across - frame.left) / frame.width);
        ys.push((frame.top - (f + uy * along + ny * across)) / frame.height);
      }
    }
    const box = { x0: Math.min(...xs), y0: Math.min(...ys), x1: Math.max(...xs), y1: Math.max(...ys) };
    // Words outside the crop box are not on the page that a person sees.
    if (box.x1 <= 0 || box.y1 <= 0 || box.x0 >= 1 || box.y0 >= 1) continue;
    // Nor is one that is larger than several pages, or whose place is no number.
    if (!(box.x1 - box.x0 < LARGEST && box.y1 - box.y0 < LARGEST)) continue;
    words.push({ text: part.text, ...box, size, direction: directionOf(a, b) });
  }
  return words;
}

function quarter(rotation: number): 0 | 90 | 180 | 270 {
  const turn = ((rotation % 360) + 360) % 360;
  return turn === 90 || turn === 180 || turn === 270 ? turn : 0;
}

function refusalOf(error: unknown): PdfRefusal {
  const name = error instanceof Error ? error.name : '';
  return name === 'PasswordException' ? 'encrypted' : 'broken';
}

/**
 * Bytes of a PDF to pages of placed words. Runs only in a killable process: pdf.js is not trusted to end by itself.
 * Nothing in the file is executed; scripts, launch actions and forms are ignored.
 */
export async function wordsOfPdf(input: {
  bytes: Uint8Array;
  maxPages: number;
  onPage?: (page: number, of: number) => void;
}): Promise<PdfWords> {
  if (input.bytes.length === 0) return { ok: false, reason: 'empty', pages: 0 };
  if (!looksLikePdf(input.bytes)) return { ok: false, reason: 'not-a-pdf', pages: 0 };
  if (isCutOff(input.bytes)) return { ok: false, reason: 'truncated', pages: 0 };
  if (await unpacksTooLarge(input.bytes)) return { ok: false, reason: 'pdf-unpacks-too-large', pages: 0 };
  const { getDocument } = await import('pdfjs-dist/legacy/build/pdf.mjs');
  const { fonts, maps } = assets();
  const task = getDocument({
    data: Uint8Array.from(input.bytes),
    standardFontDataUrl: fonts,
    cMapUrl: maps,
    disableFontFace: true,
    useSystemFonts: false,
    enableXfa: false,
    verbosity: 0,
  });
  try {
    const document = await task.promise;
    if (document.numPages > input.maxPages) return { ok: false, reason: 'too-many-pages', pages: document.numPages };
    const pages: PdfPage[] = [];
    for (let number = 1; number <= document.numPages; number++) {
      const page = await document.getPage(number);
      const [left = 0, bottom = 0, right = 0, top = 0] = page.view;
      const frame: Frame = { left, top, width: right - left || 1, height: top - bottom || 1 };
      const content = await page.getTextContent();
      const words: PdfWord[] = [];
      for (const item of content.items) {
        if (!('str' in item) || item.str.trim() === '') continue;
        const family = content.styles[item.fontName]?.fontFamily ?? '';
        words.push(...placeRun(item, frame, family === 'monospace'));
      }
      const [width, height] = [Math.min(frame.width, LARGEST_PAGE), Math.min(frame.height, LARGEST_PAGE)];
      pages.push({ number, width, height, rotation: quarter(page.rotate), words });
      page.cleanup();
      input.onPage?.(number, document.numPages);
    }
    return { ok: true, pages, pagesWithText: pages.filter((page) => page.words.length > 0).length };
  } catch (error) {
    return { ok: false, reason: refusalOf(error), pages: 0 };
  } finally {
    await task.destroy();
  }
}
