import type { CellLine, PageCell } from './cells';
import type { Column } from './columns';
import { ANY_DATE, readDate } from './dates';
import { isCode } from './identity';
import type { Table } from './tables';

const YEAR =
  /^[>*»►]?\s*(?:(?:early|late|spring|summer|fall|autumn|winter|[a-z]{3,9}\.?)\s+)?((?:19|20)\d\d)$|^\d{1,2}[/.-]\d{1,2}[/.-](\d{2,4})$/i;

type Seen = { readonly row: CellLine; readonly year: number; readonly text: string };

function yearOf(text: string): number | null {
  const dated = ANY_DATE.test(text) ? readDate(text, 'month-first') : null;
  if (dated?.ok)
    return Number(dated.iso.slice(0, 4)) + Number(dated.iso.slice(5, 7)) / 12 + Number(dated.iso.slice(8, 10)) / 400;
  const match = YEAR.exec(text.trim());
  const year = match?.[1] ?? match?.[2];
  if (year === undefined) return null;
  return Number(year.length === 2 ? `20${year}` : year);
}

function seasonOf(text: string): number {
  return /spring|mar|apr|may/i.test(text)
    ? 1
    : /summer|jun|jul|aug/i.test(text)
      ? 2
      : /fall|autumn|sep|oct|nov/i.test(text)
        ? 3
        : 0;
}

/** Later is more: the year, then the season inside it. */
function when(one: Seen): number {
  return one.year * 10 + seasonOf(one.text);
}

/** A day set on two lines ("26 Sep 2026 (this / report)") has its first line over the row's numbers. */
function dateBeside(table: Table, row: CellLine, column: Column): PageCell | undefined {
  return table.header
    .filter((line) => line.line.page === row.line.page && Math.abs(row.line.y0 - line.line.y1) < 1.2 * row.line.size)
    .flatMap((line) => line.cells)
    .find(
      (cell) =>
        Math.min(cell.phrase.x1, column.x1) > Math.max(cell.phrase.x0, column.x0) && ANY_DATE.test(cell.phrase.text),
    );
}

/**
 * Rows of one plot for several years ("2026", "2024", "2021" under a plot's name): the latest is the report's own, the
 * others are earlier years. A new plot begins with a name in its column, or after a wider gap. `at` finds a cell's column.
 */
export function earlierYears(
  table: Table,
  at: (cell: PageCell) => Column | undefined,
): { earlier: ReadonlyMap<CellLine, string>; groups: readonly (readonly CellLine[])[] } {
  const none = { earlier: new Map<CellLine, string>(), groups: [] };
  const rows = table.rows.filter((row) => row.values >= 2);
  for (const column of table.columns) {
    if (column.label !== null) continue;
    const seen = rows.flatMap((row): Seen[] => {
      const cell = row.cells.find((one) => at(one) === column) ?? dateBeside(table, row, column);
      const year = cell === undefined ? null : yearOf(cell.phrase.text);
      return year === null || cell === undefined ? [] : [{ row, year, text: cell.phrase.text }];
    });
    if (seen.length < 2 || seen.length < 0.7 * rows.length || new Set(seen.map(when)).size < 2) continue;
    const gaps = seen.slice(1).map((one, index) => one.row.line.y0 - (seen[index]?.row.line.y1 ?? 0));
    const usual = [...gaps].sort((a, b) => a - b)[Math.floor(gaps.length / 4)] ?? 0;
    const groups: Seen[][] = [];
    for (const [index, one] of seen.entries()) {
      const named = one.row.cells.some(
        (cell) => at(cell)?.field === 'sampleId' && at(cell) !== column && !isCode(cell.phrase.text),
      );
      const apart = index > 0 && (gaps[index - 1] ?? 0) > Math.max(1.6 * usual, usual + 0.6 * one.row.line.size);
      const last = groups[groups.length - 1];
      const again = last?.some((other) => other.year === one.year && other.text === one.text) ?? false;
      if (last === undefined || named || apart || again) groups.push([one]);
      else last.push(one);
    }
    if (!groups.some((group) => group.length >= 2)) continue;
    const earlier = new Map<CellLine, string>();
    for (const group of groups) {
      const best = Math.max(...group.map(when));
      for (const one of group) if (when(one) < best) earlier.set(one.row, one.text);
    }
    return { earlier, groups: groups.map((group) => group.map((one) => one.row)) };
  }
  return none;
}
