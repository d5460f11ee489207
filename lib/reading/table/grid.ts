import Papa from 'papaparse';
import { unitOnly } from '../labels/label';
import { clean } from '../labels/normal';
import { fieldOf } from './fields';
import { labelOf } from './spoken';
import type { Grid } from './types';

const DELIMITERS = [',', ';', '\t', '|'] as const;
const LOOKED_AT = 60;

function parse(text: string, delimiter: string, preview: number): string[][] {
  return Papa.parse<string[]>(text, { delimiter, preview, skipEmptyLines: false }).data;
}

function meant(cell: string): boolean {
  return (
    cell !== '' &&
    !/^[<>]?[\d.,]+$/.test(cell) &&
    (fieldOf(cell) !== null || labelOf(cell) !== null || unitOnly(cell) !== null)
  );
}

/**
 * The delimiter that makes the most sense of the first lines: most headings understood, and among equals the one that
 * cuts the lines into most cells of one width. Commas inside decimal numbers understand no heading.
 */
export function delimiterOf(text: string): string {
  let best: string = ',';
  let most = -1;
  for (const delimiter of DELIMITERS) {
    if (!text.includes(delimiter)) continue;
    const rows = parse(text, delimiter, LOOKED_AT).map((row) => row.map((cell) => clean(cell)));
    const counts = new Map<number, number>();
    for (const row of rows) {
      const width = row.filter((cell) => cell !== '').length;
      if (width > 1) counts.set(width, (counts.get(width) ?? 0) + 1);
    }
    const even = Math.max(0, ...[...counts].map(([width, count]) => count * Math.min(width, 30)));
    const understood = rows.flat().slice(0, 2_000).filter(meant).length;
    const score = understood * 1_000 + even;
    if (score > most) [best, most] = [delimiter, score];
  }
  return best;
}

/** `="007"` and `'007` are how spreadsheets keep a number as text. */
export function unwrapped(cell: string): string {
  const formula = /^="(.*)"$/.exec(cell);
  return formula?.[1] ?? (/^'[\d<>]/.test(cell) ? cell.slice(1) : cell);
}

/** Text of a data file to rows of cleaned cells. Row and column numbers are those of the file. */
export function gridOf(text: string): { grid: Grid; delimiter: string } {
  const plain = text
    .replace(/^\ufeff/, '')
    .replace(/\r\n?/g, '\n')
    .replace(/^"?sep=(.)"?\n/i, '\n');
  const declared = /^\ufeff?"?sep=(.)"?\r?\n/i.exec(text)?.[1];
  const delimiter = declared ?? delimiterOf(plain);
  const grid = parse(plain, delimiter, 0).map((row) => row.map((cell) => unwrapped(clean(cell))));
  while (grid.length > 0 && grid[grid.length - 1]?.every((cell) => cell === '')) grid.pop();
  return { grid, delimiter };
}
