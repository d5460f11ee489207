import type { Page, Word } from '../types';
import { setOf } from './place';
import type { Merged, ScannedPage } from './types';

/** Share of the type size above and below the baseline that a word's box covers; as for words of a text layer. */
const ABOVE = 0.74;
const BELOW = 0.06;

/** The merged words of a level page as a page of placed words, in fractions of the level page. */
export function pageOf(page: ScannedPage, words: readonly Merged[]): Page {
  const sets = setOf(words);
  const placed: Word[] = [];
  for (const word of words) {
    const set = sets.get(word);
    if (set === undefined) continue;
    placed.push({
      text: word.text,
      x0: word.x0 / page.width,
      x1: word.x1 / page.width,
      y0: (set.base - ABOVE * set.size) / page.height,
      y1: (set.base + BELOW * set.size) / page.height,
      size: set.size / page.scale,
      direction: 0,
    });
  }
  return {
    number: page.number,
    width: page.width / page.scale,
    height: page.height / page.scale,
    rotation: 0,
    words: placed,
  };
}
