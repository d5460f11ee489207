import type { Ink, Merged } from './types';
import { isKnown, isNumber, mended, unblurred } from './vocabulary';

function makesSense(text: string): boolean {
  return text === '%' || isNumber(text) || isKnown(text) || unblurred(text) !== null || mended(text) !== null;
}

/** A word on which the views differ or of which the engine is not certain, unless it makes sense as it is. */
export function isUnsure(word: Merged, letter: number): boolean {
  if (word.x1 - word.x0 > 30 * letter || word.y1 - word.y0 > 5 * letter) return false;
  if (word.certainty < 0.55) return true;
  if (word.others.length > 0) return true;
  return word.certainty < 0.8 && word.text.length > 1 && !makesSense(word.text);
}

/** The word with a third look, by itself, counted in: the majority stands, and sense breaks a tie. */
export function withThirdLook(word: Merged, text: string): Merged {
  const seen = text.trim();
  if (seen === '') return word;
  if (seen === word.text) return { ...word, support: word.support + 1, certainty: Math.max(word.certainty, 0.6) };
  const others = word.others.filter((other) => other !== seen);
  const seconded = word.others.includes(seen);
  const better =
    (seconded && word.support <= 1) ||
    (!makesSense(word.text) && makesSense(seen)) ||
    (word.certainty < 0.3 && makesSense(seen));
  if (!better) return { ...word, others: [...new Set([...word.others, ...(makesSense(seen) ? [seen] : [])])] };
  return {
    ...word,
    text: seen,
    support: seconded ? 2 : 1,
    certainty: Math.max(word.certainty, 0.6),
    others: [word.text, ...others].filter(makesSense),
  };
}

/** What one look alone saw, without certainty or sense: lines of dashes, borders, shades. */
export function isStray(word: Merged): boolean {
  if (!/[A-Za-z0-9%<>]/.test(word.text)) return word.support <= 1 && word.certainty < 0.85;
  return word.support <= 1 && word.certainty < 0.5 && !makesSense(word.text);
}

/** A word that only the look at left-over ink saw; nothing unless it makes sense. */
export function foundLater(box: Ink, text: string, of: number): Merged[] {
  const seen = text.trim();
  if (!makesSense(seen) || (seen.length === 1 && !/[0-9%]/.test(seen))) return [];
  return [{ ...box, text: seen, certainty: 0.6, support: 1, others: [], of, point: 'unknown' }];
}

/** True when a word that was found later stands where an uncertain one was taken. */
export function covers(later: Merged, word: Merged): boolean {
  const w = Math.min(later.x1, word.x1) - Math.max(later.x0, word.x0);
  const h = Math.min(later.y1, word.y1) - Math.max(later.y0, word.y0);
  return word.certainty < 0.7 && w > 0.5 * (word.x1 - word.x0) && h > 0.4 * (word.y1 - word.y0);
}
