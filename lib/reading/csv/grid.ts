import Papa from 'papaparse';
import { clean } from '../labels/normal';

export type Grid = readonly (readonly string[])[];

const DELIMITERS = [',', ';', '\t', '|'] as const;

function parse(text: string, delimiter: string, preview: number): string[][] {
  return Papa.parse<string[]>(text, { delimiter, preview, skipEmptyLines: false }).data;
}

/** The delimiter that cuts most of the first lines into the same number of cells, more than one. */
function delimiterOf(text: string): string {
  let best: string = ',';
  let most = 0;
  for (const delimiter of DELIMITERS) {
    const widths = parse(text, delimiter, 40).map((row) => row.filter((cell) => cell.trim() !== '').length);
    const counts = new Map<number, number>();
    for (const width of widths) if (width > 1) counts.set(width, (counts.get(width) ?? 0) + 1);
    const score = Math.max(0, ...[...counts].map(([width, count]) => count * Math.min(width, 30)));
    if (score > most) [best, most] = [delimiter, score];
  }
  return best;
}

/** Text of a data file to rows of cleaned cells. Row and column numbers are those of the file. */
export function gridOf(text: string): Grid {
  const plain = text.replace(/^\ufeff/, '').replace(/^sep=(.)\r?\n/i, '\n');
  const delimiter = delimiterOf(plain);
  return parse(plain, delimiter, 0).map((row) => row.map((cell) => clean(cell)));
}
