import type { IdentityField } from '../candidate';
import { type Label, readLabel, unitOnly } from '../labels/label';
import { fieldOf } from '../stages/identity';
import { type Role, roleOf } from '../stages/roles';
import type { Grid } from './grid';

export type Heading = {
  readonly column: number;
  readonly text: string;
  readonly label: Label | null;
  readonly field: IdentityField | null;
  readonly role: Role | null;
};
export type HeaderRow = { readonly row: number; readonly dataFrom: number; readonly headings: readonly Heading[] };

/** Rows in which a header is looked for; title rows above it are rarely more. */
const SEARCH = 40;

/** Column codes are written "P_ppm" or "pH.1to1"; for reading they are words. */
export function spoken(text: string): string {
  return text
    .replace(/_/g, ' ')
    .replace(/(\d)to(\d)/g, '$1:$2')
    .trim();
}

function labelCount(row: readonly string[]): number {
  return row.filter((cell) => cell !== '' && readLabel(spoken(cell)) !== null).length;
}

function isUnitRow(row: readonly string[] | undefined, headings: readonly Heading[]): boolean {
  if (row === undefined) return false;
  const cells = headings.filter((heading) => heading.label !== null).map((heading) => row[heading.column] ?? '');
  const filled = cells.filter((cell) => cell !== '');
  return filled.length > 0 && filled.filter((cell) => unitOnly(cell) !== null).length >= 0.6 * filled.length;
}

function isMethodRow(row: readonly string[] | undefined, headings: readonly Heading[]): boolean {
  if (row === undefined) return false;
  const cells = headings.filter((heading) => heading.label !== null).map((heading) => row[heading.column] ?? '');
  const filled = cells.filter((cell) => cell !== '');
  return (
    filled.length > 1 &&
    filled.every((cell) => !/^[<>]?\s?[\d.,]+$/.test(cell) && /[A-Za-z]{2}/.test(cell)) &&
    /mehlich|bray|olsen|dtpa|water|ignition|method|extract|acetate|1:1|1:2/i.test(filled.join(' '))
  );
}

/** The row above a header gives captions over groups of columns; a blank takes the caption to its left. */
function captionsAbove(grid: Grid, row: number, width: number): string[] {
  const above = grid[row - 1] ?? [];
  const filled = above.filter((cell) => cell !== '').length;
  if (filled < 1 || above.some((cell) => cell.length > 40) || (filled === 1 && (above[0] ?? '') !== '')) return [];
  const captions: string[] = [];
  let last = '';
  for (let column = 0; column < width; column++) {
    const cell = above[column] ?? '';
    if (cell !== '') last = cell;
    captions.push(last);
  }
  return captions;
}

function headingOf(cell: string, column: number, captions: readonly string[], extra: readonly string[]): Heading {
  const text = spoken(cell);
  const caption = spoken(captions[column] ?? '');
  const around = [...extra.map((row) => spoken(row)), caption].filter((part) => part !== '');
  const field = fieldOf(text);
  const label =
    cell === '' || field !== null
      ? null
      : (readLabel(text, around) ?? (caption === '' ? null : readLabel(`${caption} ${text}`, around)));
  const advice = /\b(recommend|to apply|apply|lime need|needed|rec)\b/i.test(`${caption} ${text}`);
  const role = advice
    ? 'recommendation'
    : /\b(optimum|desired|target|previous|last year|rating|class|mdl|detection|limit)\b/i.test(`${caption} ${text}`)
      ? (roleOf(text, false) ?? 'desired')
      : roleOf(text, column === 0);
  return {
    column,
    text: cell,
    label,
    field,
    role:
      label === null ||
      role === 'recommendation' ||
      role === 'desired' ||
      role === 'previous' ||
      role === 'rating' ||
      role === 'limit'
        ? role
        : null,
  };
}

/** The header of a data file with samples down and analytes across; a unit row and a method row below are folded in. */
export function headerRow(grid: Grid): HeaderRow | null {
  let best = -1;
  let most = 1;
  for (let row = 0; row < Math.min(grid.length, SEARCH); row++) {
    const count = labelCount(grid[row] ?? []);
    if (count > most) [best, most] = [row, count];
  }
  const cells = grid[best];
  if (cells === undefined) return null;
  const captions = captionsAbove(grid, best, cells.length);
  const plain = cells.map((cell, column) => headingOf(cell, column, captions, []));
  const extra: (readonly string[])[] = [];
  let dataFrom = best + 1;
  while (isUnitRow(grid[dataFrom], plain) || isMethodRow(grid[dataFrom], plain)) {
    extra.push(grid[dataFrom] ?? []);
    dataFrom += 1;
  }
  const headings = cells.map((cell, column) =>
    headingOf(
      cell,
      column,
      captions,
      extra.map((row) => row[column] ?? ''),
    ),
  );
  return { row: best, dataFrom, headings };
}
