import { readLabel, unitOnly } from './label';

const ENTRY =
  /(?:^|[\s,;(.])([A-Z][A-Za-z/%]{0,5}(?:-[A-Z])?)\s?(?:=|stands for|is short for)\s?([A-Za-z][A-Za-z -]{3,48})/g;

/**
 * Abbreviations that the document itself explains ("ZX = humic matter; Qa = exchangeable acidity"), as a map from the
 * abbreviation to the words. Only those that say an analyte and that the reader does not know by themselves.
 */
export function legendOf(texts: readonly string[]): ReadonlyMap<string, string> {
  const legend = new Map<string, string>();
  for (const text of texts) {
    if (!text.includes('=') && !text.includes('stands for')) continue;
    for (const match of text.matchAll(ENTRY)) {
      const [short, words] = [match[1] ?? '', (match[2] ?? '').trim()];
      if (readLabel(short) !== null || unitOnly(short) !== null || legend.has(short)) continue;
      const parts = words.split(' ');
      for (let count = Math.min(parts.length, 6); count >= 1; count--) {
        const name = parts.slice(0, count).join(' ');
        const label = readLabel(name);
        if (label === null || label.strength < 0.96) continue;
        legend.set(short, name);
        break;
      }
    }
  }
  return legend;
}

/** The words for an abbreviation that stands alone, with a unit or with "%"; the text itself where there is none. */
export function spelledOut(text: string, legend: ReadonlyMap<string, string>): string {
  if (legend.size === 0) return text;
  const match = /^([A-Z][A-Za-z/]{0,5}(?:-[A-Z])?)(%?)((?:[ ,(].*)?)$/.exec(text);
  const words = match === null ? undefined : legend.get(match[1] ?? '');
  return match === null || words === undefined ? text : `${words}${match[2] === '%' ? ' %' : ''}${match[3] ?? ''}`;
}
