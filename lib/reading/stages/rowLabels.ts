import { type Label, readLabel, unitOnly } from '../labels/label';
import type { CellLine, PageCell } from './cells';
import { type Role, roleOf } from './roles';

/** One label with the cells that follow it on its line, up to the next label. */
export type Segment = {
  readonly line: CellLine;
  readonly label: Label;
  /** Cell or cells of the label; the first gives its left edge. */
  readonly x0: number;
  readonly x1: number;
  readonly cells: readonly PageCell[];
  /** Lines above and below that hold a part of this label. */
  readonly wrapped: readonly CellLine[];
  /** What the row's own words say its numbers are: "Desired value" under a heading "Calcium". */
  readonly rowRole: Role | null;
  /** What goes on under the label: its method or a remark, never its name. */
  readonly tail: string;
};

const NUMBERLIKE = new Set(['value', 'none', 'range']);
/** Lines of one wrapped label stand closer than this share of the type size. */
const TIGHT = 0.75;
const MOST_WRAPPED = 3;

/** The label's own words without colon, leaders and bullets. */
export function labelText(text: string): string {
  return text
    .replace(/^[•▪·\-–*]\s+/, '')
    .replace(/[\s.:=_…·]+$/, '')
    .trim();
}

/** What a cell's own words name, or null; see readLabel. */
export function readOwn(text: string): Label | null {
  return readLabel(labelText(text));
}

/** "H" after a number is High; before a number of its own, well to the right, it is hydrogen. */
export function isRatingHere(line: CellLine, index: number): boolean {
  const cell = line.cells[index];
  const before = line.cells[index - 1];
  if (cell === undefined || before === undefined || cell.meaning.kind !== 'rating') return false;
  if (before.meaning.kind !== 'value' && before.meaning.kind !== 'range' && unitOnly(before.phrase.text) === null)
    return false;
  const far = cell.phrase.x0 - before.phrase.x1 > 8 * cell.phrase.size;
  return !(far && line.cells[index + 1]?.meaning.kind === 'value');
}

function isPlain(cell: PageCell): boolean {
  return cell.meaning.kind === 'text' || cell.meaning.kind === 'rating';
}

/** The cell of a neighbouring line that can be a part of a label: it begins at or near its left edge, with no number beside it. */
function partAt(line: CellLine | undefined, cell: PageCell, end: number): PageCell | null {
  if (line === undefined || line.line.page !== cell.phrase.page) return null;
  const size = cell.phrase.size;
  const part = line.cells.find(
    (one) =>
      isPlain(one) &&
      Math.abs(one.phrase.size - size) < 0.25 * size &&
      (Math.abs(one.phrase.x0 - cell.phrase.x0) < 2.2 * size ||
        Math.abs((one.phrase.x0 + one.phrase.x1) / 2 - (cell.phrase.x0 + cell.phrase.x1) / 2) < 0.6 * size ||
        Math.abs(one.phrase.x1 - cell.phrase.x1) < 0.4 * size),
  );
  if (part === undefined) return null;
  const busy = line.cells.some(
    (one) => NUMBERLIKE.has(one.meaning.kind) && one.phrase.x0 > part.phrase.x0 && one.phrase.x0 < end,
  );
  // "Organic matter: 4.3 %" under "Buffer pH: 6.84" is a row of its own, however far left the number begins.
  const next = line.cells[line.cells.indexOf(part) + 1];
  const own = part.phrase.text.endsWith(':') && next !== undefined && NUMBERLIKE.has(next.meaning.kind);
  return busy || own ? null : part;
}

type Wrap = { label: Label; lines: CellLine[]; x1: number; tail: string };

/** Rows of the neighbouring lines, nearest first, that could hold more of this label. */
function neighbours(lines: readonly CellLine[], at: number, cell: PageCell, end: number, step: 1 | -1) {
  const found: { line: CellLine; cell: PageCell }[] = [];
  let edge = cell;
  for (let index = at + step; found.length < MOST_WRAPPED; index += step) {
    const line = lines[index];
    if (line === undefined || line.line.page !== cell.phrase.page) break;
    const gap = step < 0 ? edge.phrase.y0 - line.line.y1 : line.line.y0 - edge.phrase.y1;
    if (gap > TIGHT * cell.phrase.size || gap < -2.5 * cell.phrase.size) break;
    const part = partAt(line, cell, end);
    if (part === null) {
      // A line of another block may lie between two lines of this label.
      const here = line.cells.some((one) => one.phrase.x0 < end && one.phrase.x1 > cell.phrase.x0 - cell.phrase.size);
      if (here) break;
      continue;
    }
    found.push({ line, cell: part });
    edge = part;
  }
  return found;
}

/**
 * The label of a cell, alone or with what stands over and under it. A joined reading wins over the cell's own only when
 * it says the same analyte more fully, or when the cell alone says nothing.
 */
export function wrappedLabel(lines: readonly CellLine[], at: number, cell: PageCell, end: number): Wrap | null {
  const own = readOwn(cell.phrase.text);
  const above = neighbours(lines, at, cell, end, -1);
  const below = neighbours(lines, at, cell, end, 1);
  // Lines over it that are themselves the head of another row (a label of its own, or the tail of the row before) stay away.
  let best: (Wrap & { rank: number }) | null =
    own === null ? null : { label: own, lines: [], x1: cell.phrase.x1, tail: '', rank: 10 * own.strength };
  for (let up = 0; up <= above.length; up++) {
    for (let down = 0; down <= below.length; down++) {
      if (up + down === 0) continue;
      const parts = [...above.slice(0, up).reverse(), ...below.slice(0, down)];
      const text = [
        ...above
          .slice(0, up)
          .reverse()
          .map((one) => one.cell.phrase.text),
        cell.phrase.text,
        ...below.slice(0, down).map((one) => one.cell.phrase.text),
      ]
        .join(' ')
        .replace(/(\p{L})- (\p{Ll})/gu, '$1-$2');
      const label = readOwn(text) ?? readOwn(text.replace(/(\p{Ll})-(\p{Ll})/gu, '$1$2'));
      if (label === null) continue;
      const inSalt =
        own?.analyte === 'soil_ph_water' &&
        up === 0 &&
        /^(soil_ph_salt|buffer_ph)$/.test(label.analyte) &&
        below
          .slice(0, down)
          .every((one) => /^\p{Ll}/u.test(one.cell.phrase.text) && readOwn(one.cell.phrase.text) === null);
      if (own !== null && label.analyte !== own.analyte && !inSalt && !fuller(own, label)) continue;
      // A neighbour that reads as an analyte of its own is another row's label, unless only together they have a meaning.
      const foreign = parts.some((one) => {
        const alone = readOwn(one.cell.phrase.text);
        return alone !== null && alone.analyte !== label.analyte;
      });
      if (foreign && own !== null) continue;
      const tells = (label.unit !== null ? 0.4 : 0) + (label.method !== null ? 0.4 : 0);
      const top = up > 0 ? readOwn(above[up - 1]?.cell.phrase.text ?? '') : null;
      // The name stands in the first line; a line that begins small goes on from the one before it.
      const headed = inSalt
        ? 1
        : own === null || /^[\p{Ll}(]/u.test(cell.phrase.text)
          ? top?.analyte === label.analyte
            ? 1
            : 0
          : 0;
      // What begins small is the end of another name, not the beginning of one.
      const cut = /^\p{Ll}/u.test(text) && !/^(pH|p[HK])/.test(text) ? 0.9 : 0;
      const rank = headed - cut + 10 * label.strength + tells - 0.15 * (up + down) - 0.05 * down - (foreign ? 0.5 : 0);
      const ownTells = own === null ? 0 : (own.unit !== null ? 0.4 : 0) + (own.method !== null ? 0.4 : 0);
      const current = best === null ? -1 : best.lines.length === 0 ? best.rank + ownTells : best.rank;
      if (rank > current)
        best = {
          label: { ...label, strength: Math.min(label.strength, 0.95) },
          lines: parts.map((one) => one.line),
          x1: Math.max(cell.phrase.x1, ...parts.map((one) => one.cell.phrase.x1)),
          tail: '',
          rank,
        };
    }
  }
  if (best === null) return null;
  const used = new Set(best.lines);
  const tail: string[] = [];
  for (const one of below) {
    if (used.has(one.line)) continue;
    if (!/^[\p{Ll}(]/u.test(one.cell.phrase.text) && tail.length === 0) break;
    tail.push(one.cell.phrase.text);
  }
  return { ...best, tail: tail.join(' ') };
}

/** "Base saturation" + "calcium" or "Sulfate" + "sulfur": the longer name is the real one. */
function fuller(own: Label, joined: Label): boolean {
  return joined.strength >= 0.99 && joined.text.length > own.text.length;
}

/** Row words that say what a number is, never of which analyte. */
export function rowRoleOf(text: string): Role | null {
  const bare = labelText(text);
  const role = roleOf(bare, false);
  return role === 'unit' || role === 'analyte' || role === 'date' || role === 'unknown' ? null : role;
}
