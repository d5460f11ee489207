import type { UnitKey } from '@/lib/domain/analytes';
import type { Identity, IdentityField } from '../candidate';
import { readLabel, unitIn, unitOnly } from '../labels/label';
import type { CellLine, PageCell } from './cells';
import { ANY_DATE } from './dates';
import { fieldOf, fieldWithValue } from './identity';
import { type Phrase, phraseOf } from './lines';
import { repeatedGroups } from './repeated';
import { type Role, roleOf } from './roles';
import type { Segment } from './rowLabels';
import { spansOf } from './spans';
import { ratingIn } from './values';

/** A column of numbers beside analytes that stand down the side, with everything its headings say. */
export type RunColumn = {
  readonly x0: number;
  readonly x1: number;
  readonly heading: string;
  readonly role: Role | null;
  readonly unit: { readonly unit: UnitKey; readonly printed: string } | null;
  /** Words over the column that are no role, unit or day: the name of a sample, or a heading nobody knows. */
  readonly free: string | null;
  readonly day: string | null;
  readonly identity: Identity;
};

type Column = { x0: number; x1: number; own: string[]; captions: string[]; identity: Identity };
type Span = { readonly x0: number; readonly x1: number };

function overlap(a: Span, b: Span): number {
  return Math.min(a.x1, b.x1) - Math.max(a.x0, b.x0);
}

function gap(a: Span, b: Span): number {
  return Math.max(a.x0 - b.x1, b.x0 - a.x1, 0);
}

function says(text: string): boolean {
  return roleOf(text, false) !== null || unitOnly(text) !== null || ANY_DATE.test(text) || fieldOf(text) !== null;
}

/** Two headings set so tight that they became one phrase are parted where the columns part. */
function parted(phrase: Phrase, columns: readonly Span[]): Phrase[] {
  if (phrase.words.length < 2) return [phrase];
  const homes = phrase.words.map((word) => {
    const over = columns.findIndex((column) => overlap(column, word) > 0);
    return over;
  });
  const groups: { home: number; from: number; to: number }[] = [];
  for (const [index, home] of homes.entries()) {
    const last = groups[groups.length - 1];
    if (last !== undefined && (home === last.home || home < 0)) last.to = index + 1;
    else groups.push({ home, from: index, to: index + 1 });
  }
  if (groups.length < 2) return [phrase];
  const parts = groups.map((group) => phraseOf(phrase.page, phrase.line, phrase.words.slice(group.from, group.to)));
  return parts.every((part) => says(part.text)) ? parts : [phrase];
}

/** A line such as "Lab No | 101 | 102": a field, then one answer for each sample. */
function fieldLine(line: CellLine, within: Span): { field: IdentityField; cells: readonly PageCell[] } | null {
  const [first, ...rest] = line.cells.filter((cell) => overlap(cell.phrase, within) > 0);
  if (first === undefined || rest.length === 0) return null;
  // "Lab no. 161 | Lab no. 162": the field with its answer over each column.
  const each = [first, ...rest].map((cell) => ({ cell, said: fieldWithValue(cell.phrase.text) }));
  const same = each[0]?.said?.field;
  if (same !== undefined && each.every(({ said }) => said?.field === same))
    return {
      field: same,
      cells: each.map(({ cell, said }) => ({ ...cell, phrase: { ...cell.phrase, text: said?.value ?? '' } })),
    };
  const field = fieldOf(first.phrase.text);
  if (field === null) return null;
  const other = rest.some((cell) => fieldOf(cell.phrase.text) !== null || /:\s*\S/.test(cell.phrase.text));
  return other ? null : { field, cells: rest };
}

/** True when a line gives each of several samples its number, day or depth. */
export function isFieldLine(line: CellLine, within: Span): boolean {
  return (fieldLine(line, within)?.cells.length ?? 0) >= 2;
}

const MOST_HEADER_LINES = 7;

function isYear(cell: PageCell): boolean {
  return /^(19|20)\d\d$/.test(cell.phrase.text);
}

/** Whether a line can be a heading of the rows under it: no analyte with its number, no sentence. */
function canHead(line: CellLine, within: Span, busy: ReadonlySet<CellLine>): PageCell[] | null {
  const cells = line.cells.filter((cell) => overlap(cell.phrase, within) > 0);
  if (cells.length === 0) return [];
  const fields = fieldLine(line, within);
  if (fields !== null) return fields.cells.length >= 2 ? cells : null;
  // "Sample | Barley stubble | Sampled | 12 August": a form's own line is no heading.
  const named = cells.filter((cell) => fieldOf(cell.phrase.text) !== null).length;
  const answers = cells.filter(
    (cell) => fieldOf(cell.phrase.text) === null && !says(cell.phrase.text) && readLabel(cell.phrase.text) === null,
  ).length;
  if (named > 0 && answers > 0) return null;
  if (cells.some((cell) => fieldWithValue(cell.phrase.text) !== null)) return null;
  if (busy.has(line)) return null;
  const numbers = cells.filter((cell) => cell.meaning.kind === 'value' && !isYear(cell));
  if (numbers.length > 0) return null;
  if (cells.some((cell) => cell.phrase.words.length > 9)) return null;
  if (cells.some((cell) => /:$/.test(cell.phrase.text)) || (cells.length === 1 && cells[0]?.phrase.text.includes(':')))
    return null;
  return cells;
}

/** Heading lines over the first row of a run, nearest last. */
export function headingsOver(
  lines: readonly CellLine[],
  first: Segment,
  within: Span,
  busy: ReadonlySet<CellLine>,
): CellLine[] {
  const found: CellLine[] = [];
  let under = first.line;
  for (const wrapped of first.wrapped) if (wrapped.line.y0 < under.line.y0) under = wrapped;
  for (let at = lines.indexOf(under) - 1; at >= 0 && found.length < MOST_HEADER_LINES; at--) {
    const line = lines[at];
    if (line === undefined || line.line.page !== under.line.page) break;
    const cells = canHead(line, within, busy);
    if (cells === null) break;
    if (cells.length === 0) continue;
    if (line.line.y0 > under.line.y1) break;
    const distance = under.line.y0 - line.line.y1;
    if (distance > (found.length === 0 ? 4.5 : 2.6) * Math.max(line.line.size, first.line.line.size)) break;
    found.unshift(line);
    under = line;
  }
  return found;
}

/** True for a line that only names columns: it begins a new run of rows. */
export function isHeadingLine(line: CellLine, within: Span): boolean {
  const cells = line.cells.filter((cell) => overlap(cell.phrase, within) > 0);
  if (cells.length < 2 || cells.some((cell) => cell.meaning.kind === 'value' && !isYear(cell))) return false;
  const roles = cells.filter(
    (cell, index) => roleOf(cell.phrase.text, index === 0) !== null || unitOnly(cell.phrase.text) !== null,
  );
  return roles.length >= 2 && roles.length >= 0.5 * cells.length;
}

function placeLine(phrases: readonly Phrase[], columns: readonly Column[], size: number) {
  const groups = repeatedGroups(columns, (column) => column.own.join(' '));
  const spans = groups.map((group) => ({
    x0: Math.min(...group.map((one) => one.x0)),
    x1: Math.max(...group.map((one) => one.x1)),
  }));
  if (groups.length >= 2 && phrases.length === groups.length) {
    const homes = phrases.map((phrase) => spans.findIndex((span) => overlap(span, phrase) > 0));
    if (homes.every((home, index) => home === index)) {
      for (const [index, group] of groups.entries())
        for (const column of group) column.captions.unshift(phrases[index]?.text ?? '');
      return;
    }
  }
  const claimed = new Set<Column>();
  const homes = phrases.map((phrase) => {
    const over = columns.filter((column) => overlap(column, phrase) > 0);
    // A heading that only just reaches into the next column is not over it.
    const best = Math.max(0, ...over.map((column) => overlap(column, phrase) / (column.x1 - column.x0 || 1)));
    const real = over.filter(
      (column) => overlap(column, phrase) / (column.x1 - column.x0 || 1) > 0.34 * best || over.length === 1,
    );
    for (const column of real) claimed.add(column);
    return { phrase, over: real };
  });
  for (const home of homes) {
    if (home.over.length > 0) continue;
    const near = columns
      .filter((column) => !claimed.has(column) && gap(column, home.phrase) < 4 * size)
      .sort((a, b) => gap(a, home.phrase) - gap(b, home.phrase))[0];
    const stolen =
      near === undefined
        ? undefined
        : phrases.find((other) => other !== home.phrase && gap(other, near) < gap(home.phrase, near));
    if (near === undefined || stolen !== undefined) continue;
    claimed.add(near);
    home.over.push(near);
  }
  for (const column of columns) {
    // A column whose own heading is repeated under each caption belongs to the nearest caption.
    const ownText = column.own.join(' ');
    if (claimed.has(column) || ownText === '' || homes.length < 2) continue;
    if (columns.filter((other) => other.own.join(' ') === ownText).length < 2) continue;
    const near = homes
      .filter((home) => home.over.length > 0 && gap(home.phrase, column) < 10 * size)
      .sort((a, b) => gap(a.phrase, column) - gap(b.phrase, column))[0];
    if (near !== undefined && !near.over.some((other) => other.own.join(' ') === ownText)) near.over.push(column);
  }
  for (const { phrase, over } of homes) {
    if (over.length === 1 && over[0] !== undefined) over[0].own.unshift(phrase.text);
    else for (const column of over) column.captions.unshift(phrase.text);
  }
}

function settle(column: Column, first: boolean): RunColumn {
  const pieces = [...column.own, ...column.captions];
  const heading = [...column.captions, ...column.own].join(' ');
  const ownText = column.own.join(' ');
  // "Low | Adequate | High" over a drawn scale: its columns grade, they hold no results.
  const whole = ratingIn(ownText) === null ? roleOf(ownText, first) : 'rating';
  const roleText = [ownText, ...pieces].find((text) => {
    const role = roleOf(text, first);
    return role !== null && role !== 'date' && role !== 'analyte';
  });
  const day = [ownText, ...pieces].find((text) => ANY_DATE.test(text) || roleOf(text, false) === 'date') ?? null;
  const role =
    whole !== null && whole !== 'date'
      ? whole
      : roleText !== undefined
        ? roleOf(roleText, first)
        : day !== null
          ? 'date'
          : null;
  const unitPiece = pieces.map((text) => unitOnly(text) ?? unitIn(text)).find((unit) => unit !== null) ?? null;
  const free = pieces.filter(
    (text) =>
      roleOf(text, first) === null &&
      unitOnly(text) === null &&
      fieldOf(text) === null &&
      !ANY_DATE.test(text) &&
      readLabel(text) === null &&
      ratingIn(text) === null,
  );
  return {
    x0: column.x0,
    x1: column.x1,
    heading,
    role,
    unit: unitPiece === null ? null : { unit: unitPiece.unit, printed: unitPiece.printed },
    free: free.length === 0 || (whole !== null && column.captions.length === 0) ? null : free.join(' '),
    day,
    identity: column.identity,
  };
}

/** Columns of a run of rows from its numbers, their meaning from the headings over them. */
export function runColumns(segments: readonly Segment[], headings: readonly CellLine[], within: Span): RunColumn[] {
  const rows = segments.map((segment) => ({ ...segment.line, cells: segment.cells }));
  const labels = Math.max(...segments.map((segment) => segment.x1));
  const columns: Column[] = spansOf(rows, true)
    .filter(
      (span) => span.x1 > labels - 1 || rows.some((row) => row.cells.some((cell) => overlap(cell.phrase, span) > 0)),
    )
    .map((span) => ({ ...span, own: [], captions: [], identity: {} }));
  for (const line of [...headings].reverse()) {
    const fields = fieldLine(line, within);
    if (fields !== null && fields.cells.length >= 2) {
      for (const cell of fields.cells) {
        if (roleOf(cell.phrase.text, false) !== null || unitOnly(cell.phrase.text) !== null) {
          columns.find((column) => overlap(column, cell.phrase) > 0)?.own.unshift(cell.phrase.text);
          continue;
        }
        const home = columns.filter(
          (column) => overlap(column, cell.phrase) > 0 || gap(column, cell.phrase) < cell.phrase.size,
        )[0];
        if (home !== undefined) home.identity[fields.field] ??= cell.phrase.text;
      }
      continue;
    }
    const phrases = line.cells
      .filter((cell) => overlap(cell.phrase, within) > 0 && fieldWithValue(cell.phrase.text) === null)
      .flatMap((cell) => parted(cell.phrase, columns));
    const telling =
      phrases.length > 1 ||
      phrases.some((phrase) => roleOf(phrase.text, false) !== null || unitOnly(phrase.text) !== null);
    // The heading of the labels ("Test", "Element") stands left of every number.
    const over = phrases.filter(
      (phrase) =>
        columns.some((column) => gap(column, phrase) < 4 * phrase.size) &&
        phrase.x1 > Math.min(...columns.map((one) => one.x0)) - 6 * phrase.size,
    );
    if (telling)
      placeLine(
        over.filter((phrase) => !(phrase === phrases[0] && readsAsLabelHeading(phrase, segments))),
        columns,
        line.line.size,
      );
  }
  return columns.map((column, index) => settle(column, index < 0));
}

/** "Test", "Nutrient": the first heading, over the labels themselves. */
function readsAsLabelHeading(phrase: Phrase, segments: readonly Segment[]): boolean {
  return roleOf(phrase.text, true) === 'analyte' && segments.some((segment) => overlap(segment, phrase) > 0);
}
