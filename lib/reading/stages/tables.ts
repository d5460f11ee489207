import { readLabel, unitOnly } from '../labels/label';
import { withAdvice } from './advised';
import type { CellLine, PageCell } from './cells';
import { type Column, columnsOf, headerScore } from './columns';
import { fieldsInside, fieldWithValue } from './identity';
import { roleOf } from './roles';
import { spansOf } from './spans';

export type Table = {
  readonly header: readonly CellLine[];
  readonly rows: readonly CellLine[];
  readonly columns: readonly Column[];
  readonly borrowed: boolean;
};

const HEADER_LINES = 15;

function samePage(a: CellLine, b: CellLine): boolean {
  return a.line.page === b.line.page;
}

function labelsIn(line: CellLine): number {
  return line.cells.filter((cell) => cell.meaning.kind !== 'value' && readLabel(cell.phrase.text) !== null).length;
}

function headerAbove(lines: readonly CellLine[], at: number, taken: ReadonlySet<CellLine>): CellLine[] {
  const header: CellLine[] = [];
  let under = lines[at];
  let named = false;
  for (let index = at - 1; index >= 0 && header.length < HEADER_LINES; index--) {
    const line = lines[index];
    if (line === undefined || under === undefined || taken.has(line) || !samePage(line, under) || line.values >= 2)
      break;
    if (line.values === 1 && labelsIn(line) > 0) break;
    // The name of the first plot may stand between the headings and its rows.
    if (line.cells.some((cell) => namesASample(cell))) {
      if (header.length === 0 && !named && line.cells.length <= 4) {
        named = true;
        under = line;
        continue;
      }
      break;
    }
    const gap = under.line.y0 - line.line.y1;
    if (line.line.y0 > under.line.y1) break;
    if (gap > (header.length === 0 ? 4 : 2.2) * line.line.size) break;
    header.unshift(line);
    under = line;
  }
  return header;
}

/** Labels of a line that have their number right behind them: a list, not a row of a table. */
function labelledPairs(line: CellLine): number {
  return line.cells.filter(
    (cell, index) =>
      cell.meaning.kind === 'text' &&
      line.cells[index + 1]?.meaning.kind === 'value' &&
      readLabel(cell.phrase.text) !== null,
  ).length;
}

function namesASample(cell: PageCell): boolean {
  return (
    fieldWithValue(cell.phrase.text) !== null || fieldsInside(cell.phrase.words.map((word) => word.text)).length > 0
  );
}

/** "Nutrient | lb/acre | ppm | Rating": the head of another table. */
function isRoleLine(line: CellLine): boolean {
  if (line.values > 0 || line.cells.length < 2) return false;
  const roles = line.cells.map((cell, index) => roleOf(cell.phrase.text, index === 0));
  const known = roles.filter((role, index) => role !== null || unitOnly(line.cells[index]?.phrase.text ?? '') !== null);
  return (
    known.length >= 2 &&
    known.length >= 0.6 * line.cells.length &&
    roles.some((role) => role === 'analyte' || role === 'result')
  );
}

/** A row that begins with an analyte, when the table's rows do not: a list stands under the table. */
function beginsList(line: CellLine, first: CellLine): boolean {
  const [cell] = line.cells;
  const [top] = first.cells;
  if (cell === undefined || top === undefined || line.values === 0) return false;
  const label = cell.meaning.kind === 'value' ? null : readLabel(cell.phrase.text);
  return label !== null && label.strength >= 0.97 && top.meaning.kind === 'value';
}

/** Rows under a header: until a new header, a wide gap, or lines that fit no column. */
function rowsFrom(lines: readonly CellLine[], at: number): CellLine[] {
  const rows: CellLine[] = [];
  let last: CellLine | undefined;
  for (const line of lines.slice(at)) {
    if (last !== undefined) {
      if (!samePage(line, last)) break;
      if (line.line.y0 - last.line.y1 > 5 * last.line.size || line.line.y1 < last.line.y0) break;
      const headings = labelsIn(line);
      if (headings >= 3 && line.values <= 1 && !isRatingRow(line)) break;
      if (labelledPairs(line) >= 2 || isRoleLine(line) || (rows[0] !== undefined && beginsList(line, rows[0]))) break;
    }
    rows.push(line);
    last = line;
  }
  return rows;
}

function isRow(line: CellLine, columns: readonly Column[]): boolean {
  const hits = line.cells.filter(
    (cell) => cell.meaning.kind === 'value' && columnAt(columns, cell)?.label != null,
  ).length;
  const named = line.cells.some((cell) => columnAt(columns, cell)?.field != null);
  return hits >= 2 || (hits === 1 && named);
}

/** The column over a cell: the one it shares most of its width with. */
export function columnAt(columns: readonly Column[], cell: PageCell): Column | undefined {
  let best: Column | undefined;
  let most = 0;
  for (const column of columns) {
    const over = Math.min(column.x1, cell.phrase.x1) - Math.max(column.x0, cell.phrase.x0);
    if (over > most) [best, most] = [column, over];
  }
  return best;
}

function trustworthy(columns: readonly Column[]): boolean {
  const named = columns.filter((column) => column.label !== null).length;
  const free = columns.filter((column) => column.field === null).length;
  return named >= 3 || (named === 2 && free <= 3);
}

/** Stage 5a. Tables with analytes across the top. A table at the top of a page without a header borrows the last one. */
export function tablesOf(lines: readonly CellLine[]): Table[] {
  const tables: Table[] = [];
  const taken = new Set<CellLine>();
  for (const [at, line] of lines.entries()) {
    if (taken.has(line) || line.values < 2) continue;
    const block = rowsFrom(lines, at);
    const data = block.filter((row, index) => row.values >= 2 && (index === 0 || labelsIn(row) < 2));
    const above = headerAbove(lines, at, taken);
    const under = unitsUnder(block);
    let best: { header: CellLine[]; columns: Column[]; score: number } | null = null;
    const spans = spansOf(data);
    for (let count = 1; count <= above.length; count++) {
      const header = [...above.slice(above.length - count), ...under];
      const columns = columnsOf(header, spans, false);
      const score = headerScore(columns);
      if (trustworthy(columns) && score >= (best?.score ?? 0.01)) best = { header, columns, score };
    }
    const borrowed = best === null ? borrow(tables[tables.length - 1], data, line, lines, at) : null;
    const plain = best === null ? borrowed : columnsOf(best.header, spans);
    if (plain === null || plain === undefined) continue;
    const columns = withAdvice(plain);
    const rows = block.filter((row) => isRow(row, columns) || isRatingRow(row) || isTail(row, columns));
    for (const used of [...(best?.header ?? []), ...rows]) taken.add(used);
    tables.push({ header: best?.header ?? [], rows, columns, borrowed: best === null });
  }
  return tables;
}

/** A line of units or methods set under the numbers instead of over them. */
function unitsUnder(block: readonly CellLine[]): CellLine[] {
  const line = block[1];
  if (line === undefined || line.values > 0 || line.cells.length < 2) return [];
  const units = line.cells.filter((cell) => unitOnly(cell.phrase.text) !== null).length;
  return units >= 2 && units >= 0.5 * line.cells.length ? [line] : [];
}

function borrow(
  last: Table | undefined,
  data: readonly CellLine[],
  line: CellLine,
  lines: readonly CellLine[],
  at: number,
): Column[] | null {
  const previous = last?.rows[0];
  if (last === undefined || previous === undefined || samePage(previous, line)) return null;
  if (line.line.page.number !== previous.line.page.number + 1) return null;
  const before = lines.slice(0, at).filter((other) => samePage(other, line) && other.values >= 2);
  if (before.length > 0) return null;
  const spans = spansOf(data);
  const matched = spans.filter((span) =>
    last.columns.some((column) => Math.min(column.x1, span.x1) - Math.max(column.x0, span.x0) > 0),
  );
  if (spans.length < 3 || matched.length < 0.85 * spans.length) return null;
  return [...last.columns];
}

/** A row of ratings under the numbers of a sample: "Rating | H | L | M". */
export function isRatingRow(line: CellLine): boolean {
  if (line.values > 0) return false;
  const [first, ...rest] = line.cells;
  const named = first !== undefined && rest.length > 0 && roleOf(first.phrase.text, false) === 'rating';
  if (named)
    return rest.every(
      (cell) => cell.phrase.text.length <= 16 && (cell.phrase.text.length < 3 || readLabel(cell.phrase.text) === null),
    );
  const ratings = line.cells.filter((cell) => cell.meaning.kind === 'rating').length;
  return ratings > 0 && ratings >= 0.6 * line.cells.length && line.values === 0;
}

/** The rest of a sample name that went on to the next line. */
export function isTail(line: CellLine, columns: readonly Column[]): boolean {
  return (
    line.values === 0 &&
    line.cells.length <= 2 &&
    line.cells.every((cell) => columnAt(columns, cell)?.field === 'sampleId')
  );
}
