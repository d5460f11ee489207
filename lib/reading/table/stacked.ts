import { fieldOf } from './fields';
import { labelOf } from './spoken';
import type { Grid } from './types';

const MOST_LINES = 4;

function isText(row: readonly string[] | undefined): boolean {
  if (row === undefined) return false;
  const filled = row.filter((cell) => cell !== '');
  return (
    filled.length >= 2 &&
    filled.every((cell) => cell.length <= 40 && /[\p{L}%#]/u.test(cell) && !/^[^:]{2,30}: \S/.test(cell))
  );
}

export function joined(lines: readonly string[]): string {
  return lines
    .filter((line) => line !== '')
    .reduce(
      (text, line) =>
        /[a-z]-$/.test(text) && /^[a-z]/.test(line) ? text.slice(0, -1) + line : text === '' ? line : `${text} ${line}`,
      '',
    );
}

/** Columns whose heading names an analyte. */
function namedColumns(cells: readonly string[]): number {
  return cells.filter((cell) => cell !== '' && fieldOf(cell) === null && labelOf(cell) !== null).length;
}

/**
 * Headings broken over lines ("Organic" over "Matter" over "%") are put together in the lowest of their lines, when
 * together they name clearly more columns than any line does alone. The other lines stay as they are for captions.
 */
export function withStackedHeads(grid: Grid): Grid {
  const out = grid.map((row) => row);
  for (let end = 1; end < Math.min(grid.length, 200); end++) {
    if (!isText(grid[end]) || isText(grid[end + 1]) || grid[end + 1] === undefined) continue;
    let start = end;
    while (start > 0 && end - start < MOST_LINES - 1 && isText(grid[start - 1])) start -= 1;
    if (start === end) continue;
    const lines = grid.slice(start, end + 1);
    const alone = Math.max(...lines.map((line) => namedColumns(line)));
    const width = Math.max(...lines.map((line) => line.length));
    let best: { from: number; cells: string[]; count: number } | null = null;
    for (let from = 0; from < lines.length - 1; from++) {
      const cells = Array.from({ length: width }, (_, column) =>
        joined(lines.slice(from).map((line) => line[column] ?? '')),
      );
      const count = namedColumns(cells);
      if (count >= (best?.count ?? (alone <= 1 ? alone + 1 : alone + 2))) best = { from, cells, count };
    }
    if (best === null) continue;
    for (let row = start + best.from; row < end; row++) out[row] = [];
    out[end] = best.cells;
  }
  return out;
}
