import type { Page, Word } from '../types';
import { setOf } from './place';
import type { Merged, ScannedPage } from './types';

/** Share of the type size above and below the baseline that a word's box covers; as for words of a text layer. */
const ABOVE = 0.74;
const BELOW = 0.06;
/** What is lower than this share of the usual type is an edge or a speck. */
const SPECK = 0.35;
/** White that belongs to a character on each side of its ink. */
const BESIDE = 0.04;

/** The merged words of a level page as a page of placed words, in fractions of the level page. */
export function pageOf(page: ScannedPage, words: readonly Merged[]): Page {
  const sets = setOf(words);
  const sizes = [...sets.values()].map((set) => set.size).sort((a, b) => a - b);
  const usual = sizes[Math.floor(sizes.length / 2)] ?? 0;
  const placed: Word[] = [];
  for (const word of words) {
    const set = sets.get(word);
    if (set === undefined || set.size < SPECK * usual) continue;
    const middle = (word.x0 + word.x1) / 2;
    const typed = set.advance === undefined ? 0 : (word.text.length * set.advance) / 2;
    placed.push({
      text: word.text,
      x0: Math.min(word.x0 - BESIDE * set.size, middle - typed) / page.width,
      x1: Math.max(word.x1 + BESIDE * set.size, middle + typed) / page.width,
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
