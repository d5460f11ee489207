import { type CellLine, isUnitOf, type PageCell } from './cells';

export type Span = { x0: number; x1: number };

/** `head` is where the column's own headings stand; numbers are often set to one side under them. */
export type Stack = Span & { own: string[]; captions: string[]; over: boolean; head: Span | null };

/** Share of the narrower of two spans by which they must overlap to be one column. */
const SAME_COLUMN = 0.2;

/** How far two spans overlap, in points; less than nothing is the gap between them. */
export function overlap(a: Span, b: Span): number {
  return Math.min(a.x1, b.x1) - Math.max(a.x0, b.x0);
}

/** The words of a row headed "Mean of all customers" may run over the columns of names and numbers. */
function liesOverSeveral(cell: PageCell, rows: readonly CellLine[]): boolean {
  if (cell.meaning.kind !== 'text' || cell.phrase.words.length < 2) return false;
  const covered = rows.filter(
    (row) =>
      row.line !== undefined &&
      row.cells.filter(
        (other) => other !== cell && overlap(other.phrase, cell.phrase) > 0.5 * (other.phrase.x1 - other.phrase.x0),
      ).length >= 2,
  );
  return covered.length >= 2;
}

/** Columns from the numbers and names of the data rows: cells that stand over one another; units of a list have columns of their own. */
export function spansOf(rows: readonly CellLine[], withUnits = false): Span[] {
  const cells = rows
    .flatMap((row) => row.cells.filter((cell, index) => withUnits || !isUnitOf(row.cells[index - 1], cell)))
    .filter((cell) => cell.meaning.kind !== 'rating' && !liesOverSeveral(cell, rows))
    .map((cell) => ({ x0: cell.phrase.x0, x1: cell.phrase.x1 }))
    .sort((a, b) => a.x0 - b.x0);
  const spans: Span[] = [];
  for (const cell of cells) {
    const home = spans.find(
      (span) => overlap(span, cell) > SAME_COLUMN * Math.min(span.x1 - span.x0, cell.x1 - cell.x0),
    );
    if (home === undefined) spans.push({ ...cell });
    else {
      home.x0 = Math.min(home.x0, cell.x0);
      home.x1 = Math.max(home.x1, cell.x1);
    }
  }
  return spans.sort((a, b) => a.x0 - b.x0);
}
