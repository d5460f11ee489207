import { readLabel } from '../labels/label';
import type { CellLine, PageCell } from './cells';
import type { Edge } from './edges';
import { labelText } from './rowLabels';
import type { Upright } from './words';

const FEWEST = 3;
/** Headings over the first name and lines under the last, in type sizes. */
const HEAD = 4;
const TAIL = 4;

type Labelled = { readonly cell: PageCell; readonly analyte: string; readonly line: CellLine };

/** Names of analytes that begin at one distance from the left, one under another. */
function labelColumns(lines: readonly CellLine[]): Labelled[][] {
  const columns: Labelled[][] = [];
  for (const line of lines) {
    for (const cell of line.cells) {
      if (cell.meaning.kind !== 'text' || cell.phrase.words.length > 8) continue;
      const label = readLabel(labelText(cell.phrase.text));
      if (label === null) continue;
      const size = cell.phrase.size;
      const home = columns.find((column) => Math.abs((column[0]?.cell.phrase.x0 ?? 0) - cell.phrase.x0) < 0.6 * size);
      if (home === undefined) columns.push([{ cell, analyte: label.analyte, line }]);
      else home.push({ cell, analyte: label.analyte, line });
    }
  }
  return columns
    .filter(
      (column) =>
        new Set(column.map((one) => one.line)).size >= FEWEST &&
        new Set(column.map((one) => one.analyte)).size >= FEWEST,
    )
    .sort((a, b) => (a[0]?.cell.phrase.x0 ?? 0) - (b[0]?.cell.phrase.x0 ?? 0));
}

function extent(column: readonly Labelled[]) {
  return {
    x: Math.min(...column.map((one) => one.cell.phrase.x0)),
    y0: Math.min(...column.map((one) => one.cell.phrase.y0)),
    y1: Math.max(...column.map((one) => one.cell.phrase.y1)),
    size: column[0]?.cell.phrase.size ?? 10,
  };
}

/** Numbers that stand right of one edge and left of another within a height. */
function numbersIn(lines: readonly CellLine[], x0: number, x1: number, y0: number, y1: number): number {
  let count = 0;
  for (const line of lines) {
    if (line.line.y1 < y0 || line.line.y0 > y1) continue;
    for (const cell of line.cells)
      if (cell.meaning.kind === 'value' && cell.phrase.x0 > x0 && cell.phrase.x1 < x1) count += 1;
  }
  return count;
}

/** The edge stretched up and down to the next word that lies across it; null when one does so in between. */
function stretched(page: Upright, x: number, y0: number, y1: number): Edge | null {
  let [top, bottom] = [0, page.height];
  for (const word of page.words) {
    if (word.x0 >= x - 0.5 || word.x1 <= x + 0.5) continue;
    if (word.y1 > y0 && word.y0 < y1) return null;
    if (word.y1 <= y0) top = Math.max(top, word.y1);
    else bottom = Math.min(bottom, word.y0);
  }
  return { x, y0: top, y1: bottom };
}

/** Phrases may lie across an edge with a blank between their words; then the edge is none. */
function acrossPhrases(lines: readonly CellLine[], edge: Edge): Edge | null {
  let [top, bottom] = [edge.y0, edge.y1];
  const middle = { y0: edge.y0, y1: edge.y1 };
  const over = lines.flatMap((line) =>
    line.line.phrases.filter(
      (phrase) => phrase.words.length > 4 && phrase.x0 < edge.x - phrase.size && phrase.x1 > edge.x + phrase.size,
    ),
  );
  for (const phrase of over) {
    const height = (phrase.y0 + phrase.y1) / 2;
    if (height < middle.y0 || height > middle.y1) continue;
    if (height - top < bottom - height) top = Math.max(top, phrase.y1);
    else bottom = Math.min(bottom, phrase.y0);
  }
  return bottom > top ? { x: edge.x, y0: top, y1: bottom } : null;
}

function besideLists(page: Upright, lines: readonly CellLine[]): Edge[] {
  const columns = labelColumns(lines).map((column) => ({ column, ...extent(column) }));
  const edges: Edge[] = [];
  for (const [index, right] of columns.entries()) {
    // Boxes of a form have their numbers under the names; a list has them beside, perhaps on a later line of the name.
    const edgeOfNames = Math.max(...right.column.map(({ cell }) => cell.phrase.x1)) - right.size;
    const beside = right.column.filter(({ cell, line }) =>
      lines.some(
        (other) =>
          other.line.page === line.line.page &&
          Math.abs(other.line.y0 - line.line.y0) < 3 * cell.phrase.size &&
          other.cells.some(
            (one) =>
              one.meaning.kind === 'value' &&
              one.phrase.x0 > edgeOfNames &&
              one.phrase.x0 < (columns[index + 1]?.x ?? page.width),
          ),
      ),
    );
    if (beside.length < 0.5 * right.column.length) continue;
    const left = columns
      .slice(0, index)
      .filter((other) => other.y0 < right.y1 && other.y1 > right.y0 && right.x - other.x > 8 * right.size);
    const nearest = left[left.length - 1];
    if (nearest === undefined) continue;
    const x = right.x - 0.45 * right.size;
    const next = columns[index + 1]?.x ?? page.width;
    if (numbersIn(lines, nearest.x, x, right.y0 - right.size, right.y1 + right.size) < FEWEST) continue;
    if (numbersIn(lines, right.x, next, right.y0 - right.size, right.y1 + 2 * right.size) < FEWEST) continue;
    const edge = stretched(page, x, Math.max(right.y0, nearest.y0), Math.min(right.y1, nearest.y1));
    const clear = edge === null ? null : acrossPhrases(lines, edge);
    if (clear === null || clear.y0 > Math.max(right.y0, nearest.y0) + right.size) continue;
    // Other tables over and under the lists are no part of them.
    const reach = {
      y0: Math.min(right.y0, nearest.y0) - HEAD * right.size,
      y1: Math.max(right.y1, nearest.y1) + TAIL * right.size,
    };
    edges.push({ x, y0: Math.max(clear.y0, reach.y0), y1: Math.min(clear.y1, reach.y1) });
  }
  return edges;
}

/** Headings that come twice or more in one line ("pH, O.M., CEC, pH, O.M., CEC"): one set for each sample. */
function besideBands(page: Upright, lines: readonly CellLine[]): Edge[] {
  const found: Edge[] = [];
  for (const line of lines) {
    if (line.values > 0 || line.cells.length < 4) continue;
    const words = line.cells.map((cell) => cell.phrase.text.toLowerCase());
    for (let count = Math.floor(words.length / 2); count >= 3; count--) {
      if (words.length % count !== 0) continue;
      const again = words.every((word, index) => index < count || word === words[index % count]);
      if (!again || new Set(words.slice(0, count)).size < count) continue;
      for (let at = count; at < words.length; at += count) {
        const [before, after] = [line.cells[at - 1], line.cells[at]];
        if (before === undefined || after === undefined) continue;
        const edge = stretched(page, (before.phrase.x1 + after.phrase.x0) / 2, line.line.y0, line.line.y1);
        const clear = edge === null ? null : acrossPhrases(lines, edge);
        if (clear !== null) found.push(clear);
      }
      break;
    }
  }
  // Every band of a pair of forms gives the same edge once more.
  return found.filter(
    (edge, index) =>
      found.findIndex((other) => Math.abs(other.x - edge.x) < 15 && other.y0 <= edge.y1 && other.y1 >= edge.y0) ===
      index,
  );
}

/**
 * Stage 2b. Parts of a page that stand side by side with lines of their own: two lists, two plots' forms, newspaper
 * columns. Found from names of analytes that begin anew further right, with numbers of their own, and from headings
 * that repeat in one line; an edge holds only where no word lies across it.
 */
export function edgesOf(page: Upright, lines: readonly CellLine[]): Edge[] {
  const own = lines.filter((line) => line.line.page === page);
  const bands = besideBands(page, own);
  const lists = besideLists(page, own).filter((edge) => !bands.some((other) => Math.abs(other.x - edge.x) < 25));
  return [...bands, ...lists].sort((a, b) => a.x - b.x);
}
