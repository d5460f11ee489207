import { type Candidate, type Identity, remark } from '../candidate';
import { type Label, methodInAny, readLabel, unitOnly } from '../labels/label';
import type { Remark } from '../types';
import { type Across, acrossAt, sampleOver } from './across';
import { type CellLine, numberBox, type PageCell } from './cells';
import { fieldOf } from './identity';
import { type Role, roleOf } from './roles';
import type { Value } from './values';
import { storedBox } from './words';

type RoleSpan = { readonly x0: number; readonly x1: number; readonly role: Role; readonly heading: string };
export type RoleHeader = { readonly line: CellLine; readonly spans: readonly RoleSpan[] };

/** A number of a list with the line it stands on, so that the right sample can be found. */
export type ListRow = {
  readonly candidate: Candidate;
  readonly line: CellLine;
  readonly x0: number;
  /** The sample over the number's column, when samples stand side by side. */
  readonly identity: Identity | null;
};

function overlapping(a: { x0: number; x1: number }, b: { x0: number; x1: number }): boolean {
  return Math.min(a.x1, b.x1) > Math.max(a.x0, b.x0);
}

function yearIn(text: string): number {
  return Number(/\b(19|20)\d\d\b/.exec(text)?.[0] ?? 0);
}

/** Of several dated columns the latest is the report's own; the others are earlier years. */
function settleDates(spans: readonly RoleSpan[]): RoleSpan[] {
  const years = spans.filter((span) => span.role === 'date').map((span) => yearIn(span.heading));
  const latest = Math.max(0, ...years);
  const hasResult = spans.some((span) => span.role === 'result');
  return spans.map((span) => {
    if (span.role !== 'date') return span;
    return { ...span, role: !hasResult && yearIn(span.heading) === latest ? 'result' : 'previous' };
  });
}

/** A line of column headings ("Test, Result, Optimum, Rating"), each possibly on two lines. */
function roleHeader(line: CellLine, above: CellLine | undefined): RoleHeader | null {
  const near =
    above !== undefined &&
    above.line.page === line.line.page &&
    line.line.y0 - above.line.y1 < 1.2 * line.line.size &&
    above.values === 0;
  const spans: RoleSpan[] = [];
  for (const [index, cell] of line.cells.entries()) {
    const over = near ? above.cells.find((other) => overlapping(other.phrase, cell.phrase)) : undefined;
    const first = index === 0;
    const joined = over === undefined ? null : `${over.phrase.text} ${cell.phrase.text}`;
    const unit = unitOnly(cell.phrase.text);
    const role =
      (joined === null ? null : roleOf(joined, first)) ??
      roleOf(cell.phrase.text, first) ??
      (unit === null ? null : 'result');
    // A heading that says nothing we know still has a column of its own; its numbers must not go to a neighbour.
    spans.push({
      x0: cell.phrase.x0,
      x1: cell.phrase.x1,
      role: role ?? 'unknown',
      heading: joined ?? cell.phrase.text,
    });
  }
  const known = spans.filter((span) => span.role !== 'unknown');
  const telling = known.filter((span) => span.role !== 'analyte').length;
  const enough = known.length >= 2 && telling >= 1 && known.length >= 0.6 * line.cells.length;
  return enough ? { line, spans: settleDates(spans) } : null;
}

/** The heading that a cell stands under: the one it overlaps, else the nearest that begins left of its end. */
function roleFor(header: RoleHeader | null, cell: PageCell): RoleSpan | null {
  if (header === null) return null;
  const over = header.spans.filter((span) => overlapping(span, cell.phrase));
  if (over.length > 0) return over[0] ?? null;
  const left = header.spans.filter((span) => span.x0 <= cell.phrase.x1);
  const before = left[left.length - 1];
  const after = header.spans.find((span) => span.x0 > cell.phrase.x1);
  if (before === undefined) return null;
  const toBefore = cell.phrase.x0 - before.x1;
  const toAfter = after === undefined ? Number.POSITIVE_INFINITY : after.x0 - cell.phrase.x1;
  return toAfter < 0.5 * toBefore && after !== undefined ? after : before;
}

type Found = {
  value: Value;
  cell: PageCell;
  unit: Value['unit'];
  unitPrinted: string | null;
  rating: string | null;
  role: RoleSpan | null;
};

function segmentValues(cells: readonly PageCell[], header: RoleHeader | null): { found: Found[]; methodText: string } {
  const found: Found[] = [];
  let methodText = '';
  let ahead: { unit: Value['unit']; printed: string } | null = null;
  for (const cell of cells) {
    const last = found[found.length - 1];
    const role = roleFor(header, cell);
    const unit = unitOnly(cell.phrase.text);
    if (cell.meaning.kind === 'value' && role?.role !== 'method') {
      const headUnit = role === null ? null : unitOnly(role.heading);
      found.push({
        value: cell.meaning,
        cell,
        unit: cell.meaning.unit ?? headUnit?.unit ?? ahead?.unit ?? null,
        unitPrinted: cell.meaning.unitPrinted ?? headUnit?.printed ?? ahead?.printed ?? null,
        rating: cell.meaning.rating,
        role,
      });
    } else if (unit !== null) {
      for (const one of role?.role === 'unit'
        ? found.filter((other) => other.unit === null)
        : last === undefined
          ? []
          : [last]) {
        if (one.unit === null) [one.unit, one.unitPrinted] = [unit.unit, unit.printed];
      }
      if (found.length === 0) ahead = unit;
    } else if (cell.meaning.kind === 'rating' && last !== undefined) last.rating ??= cell.meaning.rating;
    else if (header === null && found.length > 0 && cell.meaning.kind === 'text') break;
    else if (cell.meaning.kind === 'text') methodText += ` ${cell.phrase.text}`;
  }
  return { found, methodText };
}

const NOT_RESULTS = new Set<Role>([
  'desired',
  'previous',
  'limit',
  'difference',
  'recommendation',
  'rating',
  'method',
  'date',
]);

function choose(found: readonly Found[]): { taken: Found[]; doubts: Remark[]; position: number } {
  const named = found.filter((one) => one.role?.role === 'result');
  if (named.length === 1) return { taken: named, doubts: [], position: 1 };
  const free = named.length > 1 ? named : found.filter((one) => one.role === null || !NOT_RESULTS.has(one.role.role));
  if (free.length <= 1) return { taken: [...free], doubts: [], position: 0.99 };
  const units = free.map((one) => one.unit);
  if (units.every((unit) => unit !== null) && new Set(units).size === units.length)
    return { taken: [...free], doubts: [], position: 0.97 };
  const doubt = remark(
    'several-numbers',
    `The line holds ${free.length} numbers and no heading says which is the result; the first was taken.`,
  );
  return { taken: free.slice(0, 1), doubts: [doubt], position: 0.6 };
}

/** A label on this line, or one whose words went on from the line above or to the line below. */
function labelAt(lines: readonly CellLine[], at: number, cell: PageCell, next: PageCell | undefined): Label | null {
  if (cell.meaning.kind === 'value' || cell.meaning.kind === 'range') return null;
  const own = readLabel(cell.phrase.text.replace(/[:=]\s*$/, '').replace(/\s*\.{3,}\s*$/, ''));
  if (own !== null) return own;
  if (cell.meaning.kind !== 'text' || next?.meaning.kind !== 'value') return null;
  for (const side of [-1, 1]) {
    const line = lines[at + side];
    if (line === undefined || line.line.page !== cell.phrase.page) continue;
    const near = side < 0 ? cell.phrase.y0 - line.line.y1 : line.line.y0 - cell.phrase.y1;
    const other = line.cells.find((one) => Math.abs(one.phrase.x0 - cell.phrase.x0) < cell.phrase.size);
    if (
      other === undefined ||
      near > 0.9 * cell.phrase.size ||
      line.cells.some(
        (one) => one.meaning.kind === 'value' && one.phrase.x0 < cell.phrase.x1 + 200 && one.phrase.x0 > cell.phrase.x0,
      )
    )
      continue;
    const text = side < 0 ? `${other.phrase.text} ${cell.phrase.text}` : `${cell.phrase.text} ${other.phrase.text}`;
    const wrapped = readLabel(text);
    if (wrapped !== null) return { ...wrapped, strength: Math.min(wrapped.strength, 0.96) };
  }
  return null;
}

/** "H" after a number is High; before a number of its own, well to the right, it is hydrogen. */
function isRatingHere(line: CellLine, index: number): boolean {
  const cell = line.cells[index];
  const before = line.cells[index - 1];
  if (cell === undefined || before === undefined || cell.meaning.kind !== 'rating') return false;
  if (before.meaning.kind !== 'value' && before.meaning.kind !== 'range' && unitOnly(before.phrase.text) === null)
    return false;
  const far = cell.phrase.x0 - before.phrase.x1 > 8 * cell.phrase.size;
  return !(far && line.cells[index + 1]?.meaning.kind === 'value');
}

/** Label set over and under a line that holds only its numbers. */
function labelAround(lines: readonly CellLine[], at: number): { label: Label; cell: PageCell } | null {
  const [above, line, under] = [lines[at - 1], lines[at], lines[at + 1]];
  const [first, over, below] = [line?.cells[0], above?.cells[0], under?.cells[0]];
  if (first?.meaning.kind !== 'value' || over === undefined || below === undefined || above?.values !== 0) return null;
  if (
    under?.values !== 0 ||
    Math.abs(over.phrase.x0 - below.phrase.x0) > over.phrase.size ||
    over.phrase.x1 > first.phrase.x0
  )
    return null;
  if (
    first.phrase.y0 - over.phrase.y1 > 0.3 * first.phrase.size ||
    below.phrase.y0 - first.phrase.y1 > 0.3 * first.phrase.size
  )
    return null;
  const label = readLabel(`${over.phrase.text} ${below.phrase.text}`);
  return label === null ? null : { label: { ...label, strength: Math.min(label.strength, 0.96) }, cell: over };
}

function rowsOfLine(
  lines: readonly CellLine[],
  at: number,
  header: RoleHeader | null,
  across: Across | null,
): ListRow[] {
  const line = lines[at];
  if (line === undefined) return [];
  const starts = line.cells.flatMap((cell, index) => {
    if (isRatingHere(line, index) || fieldOf(cell.phrase.text) !== null) return [];
    const role = roleFor(header, cell)?.role;
    if (role === 'rating' || role === 'unit' || role === 'method') return [];
    const label = labelAt(lines, at, cell, line.cells[index + 1]);
    return label === null ? [] : [{ index, label, cell }];
  });
  const around = starts.length === 0 ? labelAround(lines, at) : null;
  if (around !== null) starts.push({ index: -1, ...around });
  return starts.flatMap(({ index, label, cell }, order) => {
    const end = starts[order + 1]?.index ?? line.cells.length;
    const { found, methodText } = segmentValues(line.cells.slice(index + 1, end), header);
    const over = found.map((one) => (across === null ? null : sampleOver(across, one.cell.phrase)));
    const sideBySide = header === null && found.length > 0 && over.every((identity) => identity !== null);
    const { taken, doubts, position } = sideBySide ? { taken: found, doubts: [], position: 0.99 } : choose(found);
    const method = label.method === null ? methodInAny(label.analyte, methodText) : null;
    return taken.map((one): ListRow => {
      const withUnit = one.unit === '%' && label.unit === null ? readLabel(`${label.text} %`) : null;
      const better = withUnit?.analyte.startsWith('sat_') ? withUnit : label;
      return {
        line,
        x0: cell.phrase.x0,
        identity: sideBySide ? (over[found.indexOf(one)] ?? null) : null,
        candidate: {
          label: { ...better, text: label.text },
          value: one.value,
          rating: one.rating,
          unit: one.unit ?? label.unit,
          unitPrinted: one.unitPrinted ?? label.unitPrinted,
          method: label.method ?? method?.method ?? null,
          methodPrinted: label.methodPrinted ?? method?.printed ?? null,
          page: line.line.page.number,
          box: storedBox(line.line.page, numberBox(one.cell.phrase, one.value.span)),
          cell: null,
          position,
          doubts,
        },
      };
    });
  });
}

/** Stage 6b. Lists and forms: a label, then its number on the same line, the column chosen by its heading. */
export function listRows(
  lines: readonly CellLine[],
  taken: ReadonlySet<CellLine>,
  across: readonly Across[],
): { rows: ListRow[]; headers: RoleHeader[] } {
  const rows: ListRow[] = [];
  const headers: RoleHeader[] = [];
  let header: RoleHeader | null = null;
  for (const [at, line] of lines.entries()) {
    if (header !== null && header.line.line.page !== line.line.page) header = null;
    if (taken.has(line)) continue;
    const found =
      line.values <= line.cells.filter((cell) => /^(19|20)\d\d$/.test(cell.phrase.text)).length
        ? roleHeader(line, lines[at - 1])
        : null;
    if (found !== null) {
      header = found;
      headers.push(found);
      continue;
    }
    if (line.values > 0)
      rows.push(...rowsOfLine(lines, at, header, acrossAt(across, line.line.page.number, line.line.y0)));
  }
  return { rows, headers };
}
