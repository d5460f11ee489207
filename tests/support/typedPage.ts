import { type CellLine, cellsOf } from '@/lib/reading/stages/cells';
import { linesOf } from '@/lib/reading/stages/lines';
import { uprightWords } from '@/lib/reading/stages/words';
import type { Page, Word } from '@/lib/reading/types';

export const WIDE = 900;
export const HIGH = 800;
export const MARGIN = 30;
/** Points from one letter to the next and from one line to the next; two blanks part two phrases. */
export const STEP = 6;
export const LEADING = 12;

/** One word in points from the top left of the page. */
export function placedWord(text: string, x: number, y: number, size = 10, direction: Word['direction'] = 0): Word {
  const x1 = x + text.length * 0.6 * size;
  return { text, x0: x / WIDE, y0: y / HIGH, x1: x1 / WIDE, y1: (y + size) / HIGH, size, direction };
}

export function pageOfWords(words: readonly Word[], number = 1): Page {
  return { number, width: WIDE, height: HIGH, rotation: 0, words };
}

/** A page in typewriter type, from text as it would stand on it; an empty first line is left out. */
export function typedPage(text: string, number = 1): Page {
  const words = text
    .replace(/^\n/, '')
    .split('\n')
    .flatMap((line, row) =>
      [...line.matchAll(/\S+/g)].map((match) =>
        placedWord(match[0], MARGIN + match.index * STEP, MARGIN + row * LEADING),
      ),
    );
  return pageOfWords(words, number);
}

export function linesOfPage(page: Page): CellLine[] {
  return cellsOf(linesOf(uprightWords(page)), { decimalComma: false }, new Map());
}

export function typedLines(text: string): CellLine[] {
  return linesOfPage(typedPage(text));
}
