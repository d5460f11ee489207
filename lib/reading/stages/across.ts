import type { Identity } from '../candidate';
import type { CellLine, PageCell } from './cells';
import { fieldOf } from './identity';

/** Samples that stand side by side over a list of analytes, each with the span of its column. */
export type Across = {
  readonly page: number;
  readonly y0: number;
  readonly lines: readonly CellLine[];
  readonly columns: readonly { readonly x0: number; readonly x1: number; readonly identity: Identity }[];
};

const NAMES = new Set(['sampleId', 'labNumber', 'fieldName']);

function overlaps(a: { x0: number; x1: number }, b: { x0: number; x1: number }): boolean {
  return Math.min(a.x1, b.x1) > Math.max(a.x0, b.x0);
}

/** A line such as "Sample ID | Top | Middle | Bottom": one heading, then at least two names and no second heading. */
function namesOn(line: CellLine): PageCell[] | null {
  const [first, ...rest] = line.cells;
  if (first === undefined || rest.length < 2) return null;
  const field = fieldOf(first.phrase.text);
  if (field === null || rest.some((cell) => fieldOf(cell.phrase.text) !== null || cell.phrase.text.includes(':')))
    return null;
  return rest;
}

/** Stage 4d. Samples across the top of a list; further lines of the same shape add their numbers and days. */
export function samplesAcross(lines: readonly CellLine[]): Across[] {
  const found: Across[] = [];
  for (const line of lines) {
    const names = namesOn(line);
    const field = line.cells[0] === undefined ? null : fieldOf(line.cells[0].phrase.text);
    if (names === null || field === null) continue;
    const last = found[found.length - 1];
    const same =
      last !== undefined &&
      last.page === line.line.page.number &&
      names.every((cell) => last.columns.some((column) => overlaps(column, cell.phrase)));
    if (last !== undefined && same) {
      const columns = last.columns.map((column) => {
        const cell = names.find((one) => overlaps(one.phrase, column));
        if (cell === undefined) return column;
        const identity: Identity = { [field]: cell.phrase.text, ...column.identity };
        return { x0: Math.min(column.x0, cell.phrase.x0), x1: Math.max(column.x1, cell.phrase.x1), identity };
      });
      found[found.length - 1] = { ...last, lines: [...last.lines, line], columns };
    } else if (NAMES.has(field)) {
      const columns = names.map((cell) => ({
        x0: cell.phrase.x0,
        x1: cell.phrase.x1,
        identity: { [field]: cell.phrase.text },
      }));
      found.push({ page: line.line.page.number, y0: line.line.y0, lines: [line], columns });
    }
  }
  return found;
}

/** The samples over a place of the page, or null. */
export function acrossAt(across: readonly Across[], page: number, y: number): Across | null {
  const above = across.filter((one) => one.page === page && one.y0 < y);
  return above[above.length - 1] ?? null;
}

/** The sample whose column a number stands in. */
export function sampleOver(across: Across, span: { x0: number; x1: number }): Identity | null {
  const near = across.columns.filter((column) => overlaps(column, span));
  return near.length === 1 ? (near[0]?.identity ?? null) : null;
}
