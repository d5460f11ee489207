import type { Merged } from './types';

/** Share of a word that another lies over, from which on the shorter is a part of the longer seen once more. */
const OVER = 0.7;
/** Gap between a figure and the point after it, in heights of the figure. */
const NEAR = 0.45;

/** So many doubtful scraps on one line, and hardly a word beside them, are a line typed of dashes or equals signs. */
const SCRAPS = 6;
const MOSTLY = 0.8;

/** The words without what a rule typed of "=====" was taken for. */
export function withoutTypedRules(words: readonly Merged[], letter: number): Merged[] {
  const isScrap = (word: Merged) => word.support <= 1 && word.certainty < 0.76 && word.text.length <= 3;
  const middle = (word: Merged) => (word.y0 + word.y1) / 2;
  const scraps = words.filter(isScrap);
  if (scraps.length < SCRAPS) return [...words];
  return words.filter((word) => {
    if (!isScrap(word)) return true;
    const line = words.filter((other) => Math.abs(middle(other) - middle(word)) < 0.5 * letter);
    const here = line.filter(isScrap).length;
    return here < SCRAPS || here < MOSTLY * line.length;
  });
}

function sharedOf(word: Merged, other: Merged): number {
  const w = Math.min(word.x1, other.x1) - Math.max(word.x0, other.x0);
  const h = Math.min(word.y1, other.y1) - Math.max(word.y0, other.y0);
  return w <= 0 || h <= 0 ? 0 : (w * h) / ((word.x1 - word.x0) * (word.y1 - word.y0) || 1);
}

/** "4" and ".3" where another look saw "4.3": the parts are no words of their own. */
function isPart(word: Merged, words: readonly Merged[]): boolean {
  if (word.support > 1 || word.text.length > 4) return false;
  return words.some(
    (other) => other.text.length > word.text.length && other.text.includes(word.text) && sharedOf(word, other) > OVER,
  );
}

/** The ".6" that stands close after a "6" on the same line, or none. */
function tailOf(word: Merged, words: readonly Merged[]): Merged | undefined {
  if (!/^[<>]?\d{1,4}$/.test(word.text)) return undefined;
  const height = word.y1 - word.y0;
  const middle = (word.y0 + word.y1) / 2;
  return words.find(
    (other) =>
      /^[.,]\d{1,3}$/.test(other.text) &&
      other.y0 < middle + 0.3 * height &&
      other.y1 > middle &&
      other.y1 - other.y0 < 1.5 * height &&
      Math.abs(other.x0 - word.x1) < NEAR * height,
  );
}

/** Numbers that a look cut at their point put together again, and parts of words that another look saw whole left out. */
export function wholeWords(words: readonly Merged[]): Merged[] {
  const kept = words.filter((word) => !isPart(word, words));
  const tails = new Map(
    kept.flatMap((word) => {
      const tail = tailOf(word, kept);
      return tail === undefined ? [] : [[word, tail] as const];
    }),
  );
  const used = new Set(tails.values());
  return kept
    .filter((word) => !used.has(word))
    .map((word) => {
      const tail = tails.get(word);
      if (tail === undefined) return word;
      return {
        ...word,
        text: word.text + tail.text,
        x1: Math.max(word.x1, tail.x1),
        y0: Math.min(word.y0, tail.y0),
        y1: Math.max(word.y1, tail.y1),
        certainty: Math.min(word.certainty, tail.certainty),
        support: Math.min(word.support, tail.support),
        others: [...new Set([...word.others, ...tail.others])].filter((other) => other !== word.text + tail.text),
      };
    });
}
