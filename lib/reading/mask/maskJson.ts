import { classOf } from './tokens';
import { plain } from './vocabulary';

const BLOCK = '█';
/** Keys, codes and kinds that the program itself writes: "soil_ph_water", "not-soil", "roleHeaders". */
const PROGRAM_WORD = /^[a-z][a-zA-Z0-9]*(?:[-_.:/][a-zA-Z0-9]+)*$/;
const LONGEST_WHOLE_NUMBER = 9999;

const blocks = (token: string) => BLOCK.repeat(Math.max(1, [...token].length));

/**
 * Masks every text of a value that becomes JSON. Purpose: what the stages of the reader saw goes with a report of a fault,
 * without a name in it. A word stays if it is a value or known to the registry and stands nowhere among the hidden words,
 * or if it is one of the program's own words and cannot have come from the page; whole numbers of five digits and more go,
 * since they may be a telephone or account number. Names of fields stay. `pages` are written out once and then referred to,
 * because every line of a stage points to its own. Errors: none.
 */
export function maskJson(
  value: unknown,
  hiddenWords: readonly string[],
  pageText: string,
  pages: readonly object[] = [],
): unknown {
  // A part of a hidden day or telephone number is an ordinary number elsewhere.
  const parts = hiddenWords.flatMap((word) => plain(word).split(' ')).filter((part) => !/^\d{1,4}$/.test(part));
  const hidden = new Set([...hiddenWords.map(plain), ...parts].filter((text) => text !== ''));
  const joined = plain(pageText).replaceAll(' ', '');
  const maskToken = (token: string): string => {
    if (!/[\p{L}\p{N}]/u.test(token)) return token;
    const bare = plain(token);
    if (!hidden.has(bare) && classOf(token) !== 'unknown') return token;
    if (!hidden.has(bare) && PROGRAM_WORD.test(token) && !joined.includes(bare.replaceAll(' ', ''))) return token;
    return blocks(token);
  };
  const maskText = (text: string) =>
    text
      .split(/(\s+)/)
      .map((part) => (/^\s*$/.test(part) ? part : maskToken(part)))
      .join('');
  const written = new Set<object>();
  const walk = (one: unknown): unknown => {
    if (typeof one === 'string') return maskText(one);
    if (typeof one === 'number') return Number.isInteger(one) && Math.abs(one) > LONGEST_WHOLE_NUMBER ? BLOCK : one;
    if (Array.isArray(one)) return one.map(walk);
    if (one instanceof Set) return [...one].map(walk);
    if (one instanceof Map) return [...one].map(([key, held]) => [walk(key), walk(held)]);
    if (typeof one === 'object' && one !== null && pages.includes(one)) {
      if (written.has(one)) return { samePage: pages.indexOf(one) + 1 };
      written.add(one);
    }
    if (typeof one === 'object' && one !== null)
      return Object.fromEntries(
        Object.entries(one).map(([key, held]) => [fieldName(key) ? key : maskText(key), walk(held)]),
      );
    return one ?? null;
  };
  return walk(value);
}

/** A field of ours, not a text of the page that somebody used as a key. */
const fieldName = (key: string): boolean => /^[a-z][a-zA-Z0-9]*$/.test(key);
