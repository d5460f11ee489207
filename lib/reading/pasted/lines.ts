const TAB = 8;

export type TextLine = {
  /** The line with tabs opened out and marks of quoting blanked, so that places stay true. */
  readonly text: string;
  /** From 1: the character of the line as it came, for each character of `text`. */
  readonly column: (at: number) => number;
};

/** Lines as a typewriter would set them. "> " before quoted lines of a mail is blanked, not cut. */
export function linesOfText(text: string): TextLine[] {
  const rows = text
    .replace(/^\ufeff/, '')
    .replace(/\r\n?/g, '\n')
    .replace(/\f/g, '\n')
    .split('\n');
  while (rows.length > 0 && (rows[rows.length - 1] ?? '').trim() === '') rows.pop();
  return rows.map((row) => {
    const plain = row.replace(/\u00a0/g, ' ').replace(/^(?:[>|] ?)+(?=\S|\s|$)/, (marks) => ' '.repeat(marks.length));
    if (!plain.includes('\t')) return { text: plain, column: (at) => at + 1 };
    let out = '';
    const origins: number[] = [];
    for (const [index, letter] of [...plain].entries()) {
      // A tab is never a single blank, which would join two cells into one phrase.
      const rest = TAB - (out.length % TAB);
      const width = letter === '\t' ? (rest === 1 ? TAB + 1 : rest) : 1;
      out += letter === '\t' ? ' '.repeat(width) : letter;
      for (let step = 0; step < width; step++) origins.push(index);
    }
    return { text: out, column: (at) => (origins[at] ?? at) + 1 };
  });
}

export type Chunk = { readonly text: string; readonly from: number; readonly to: number };

/** The pieces of a line between gaps of at least `gap` blanks. */
export function chunksOf(line: string, gap: number): Chunk[] {
  const chunks: Chunk[] = [];
  const words = gap === 1 ? /\S+/g : new RegExp(`\\S+(?: {1,${gap - 1}}\\S+)*`, 'g');
  for (const match of line.matchAll(words))
    chunks.push({ text: match[0], from: match.index, to: match.index + match[0].length });
  return chunks;
}

/** True when most lines are cells parted by one sign, as in a data file. */
export function isDelimited(text: string): boolean {
  const lines = text.split(/\r\n?|\n/).filter((line) => line.trim() !== '');
  const most = (least: number, sign: RegExp) =>
    lines.filter((line) => (line.match(sign)?.length ?? 0) >= least).length >= 0.6 * lines.length;
  return most(1, /\t/g) || most(2, /;/g) || most(2, /\|/g) || most(2, /,(?! )/g);
}
