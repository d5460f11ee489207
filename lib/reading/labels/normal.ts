/**
 * One spelling for what is one word on paper: subscripts and ligatures unfolded, dashes and quotes made plain, case
 * dropped, brackets and commas turned into blanks, footnote marks removed. ":" and "." stay inside numbers ("1:1").
 */
export function normal(text: string): string {
  return text
    .normalize('NFKC')
    .replace(/[\u2010-\u2015\u2212]/g, '-')
    .replace(/[\u03bc\u00b5]/g, 'u')
    .toLowerCase()
    .replace(/\b(bray|mehlich)(\d)\b/g, '$1 $2')
    .replace(/[*†‡§]/g, ' ')
    .replace(/[()[\]{},;"]/g, ' ')
    .replace(/\.(?!\d)/g, ' ')
    .replace(/:(?![\da-z])/g, ' ')
    .replace(/\s*([-/])\s*/g, '$1')
    .replace(/\s+/g, ' ')
    .trim();
}

/** A word or cell longer than this is cut: nothing a laboratory prints in one is, and each pattern's time is bounded by it. */
export const LONGEST_TEXT = 1_000;

/** Control and bidirectional characters never reach the grid or a sentence. */
export function clean(given: string): string {
  const text = given.length > LONGEST_TEXT ? given.slice(0, LONGEST_TEXT) : given;
  // Nearly every word is plain printable ASCII and needs no cleaning.
  if (/^[!-~]+$/.test(text)) return text;
  return (
    text
      // biome-ignore lint/suspicious/noControlCharactersInRegex: these are what is being removed
      .replace(/[\u0000-\u001f\u007f-\u009f\u200b-\u200f\u202a-\u202e\u2066-\u2069\ufeff]/g, ' ')
      .replace(/\u00a0/g, ' ')
      .replace(/[\u2010\u2011\u2212]/g, '-')
      .replace(/\s+/g, ' ')
      .trim()
  );
}

/** Position of `part` in `text` as a whole word, or -1. */
export function findWhole(text: string, part: string): number {
  let from = 0;
  for (;;) {
    const at = text.indexOf(part, from);
    if (at < 0) return -1;
    const before = text[at - 1] ?? ' ';
    const after = text[at + part.length] ?? ' ';
    const openStart = !/[a-z0-9]/.test(part[0] ?? '') || !/[a-z0-9.]/.test(before);
    const openEnd = !/[a-z0-9]/.test(part[part.length - 1] ?? '') || !/[a-z0-9:]/.test(after);
    if (openStart && openEnd) return at;
    from = at + 1;
  }
}
