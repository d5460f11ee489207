import { KNOWN_WORDS } from './vocabulary';

export type WordClass = 'number' | 'known' | 'mark' | 'unknown';

const VALUE = /^[<>≤≥~±+=-]?\d{1,4}(?:[.,]\d{1,4})?$/;
const THOUSANDS = /^[<>≤≥]?\d{1,2},\d{3}(?:\.\d{1,2})?$/;
const RANGE = /^(\d{1,4}(?:\.\d{1,3})?)[-–](\d{1,4}(?:\.\d{1,3})?)$/;
const RATING_GLUED = /^(.*\d)(?:VL|VH|L|M|H|O|E|S)[+-]?$/;
const SOLUTION = /^\d:\d(?:\.\d)?$/;

/**
 * A number as a laboratory prints a value: at most four digits before the point, a sign or rating letter beside it. What
 * may be a telephone, postal, account or laboratory number (five digits in a row, three and four with a dash) or a day is none.
 */
function isValue(text: string): boolean {
  const bare = text.replace(/[*%†‡]+$/u, '').replace(/[.,;:]+$/, '');
  if (VALUE.test(bare) || THOUSANDS.test(bare) || SOLUTION.test(bare)) return true;
  const range = RANGE.exec(bare);
  if (range) return !/^\d{3}-\d{4}$/.test(bare) && !/^\d{4}[-–]\d/.test(bare);
  const glued = RATING_GLUED.exec(bare);
  return glued?.[1] !== undefined && glued[1] !== bare && isValue(glued[1]);
}

/** What a printed word is. A word made of several parts is known only when each of them is. */
export function classOf(text: string): WordClass {
  if (!/[\p{L}\p{N}]/u.test(text)) return 'mark';
  if (isValue(text.replace(/^[([]+|[)\]]+$/g, ''))) return 'number';
  const parts = text
    .normalize('NFKD')
    .replace(/\p{M}/gu, '')
    .split(/[^\p{L}\p{N}.]+/u)
    .map((part) => part.replace(/^\.+|\.+$/g, ''))
    .filter((part) => part !== '');
  // Numbers with dashes or strokes between them and not a value by themselves: a day, a telephone number.
  if (parts.length > 1 && !/\p{L}/u.test(text)) return 'unknown';
  const every = parts.every((part) => KNOWN_WORDS.has(part.toLowerCase().replace(/\./g, '')) || isValue(part));
  return parts.length > 0 && every ? 'known' : 'unknown';
}

export const digitsOf = (text: string): number => text.replace(/\D/g, '').length;
