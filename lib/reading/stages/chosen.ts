import { type Identity, remark } from '../candidate';
import { unitOnly } from '../labels/label';
import type { Remark } from '../types';
import type { CellLine, PageCell } from './cells';
import { isCode } from './identity';
import type { NotTaken } from './notTaken';
import { type Role, roleOf } from './roles';
import { labelText, type Segment } from './rowLabels';
import type { RunColumn } from './runColumns';
import { overlapping, type Run } from './runs';
import type { Value } from './values';

/** Roles of columns and rows whose numbers are never results. */
export const NOT_RESULTS = new Set<Role>([
  'desired',
  'previous',
  'limit',
  'difference',
  'recommendation',
  'rating',
  'method',
  'date',
]);

type Found = {
  value: Value;
  cell: PageCell;
  column: RunColumn | null;
  unit: Value['unit'];
  unitPrinted: string | null;
  unitFrom: 'heading' | 'row';
  rating: string | null;
  /** Words just before the number on its own line: "Found", "Desired". */
  said: Role | null;
};

function columnOf(columns: readonly RunColumn[], cell: PageCell): RunColumn | null {
  return columns.find((column) => overlapping(column, cell.phrase)) ?? null;
}

/** The numbers of a row, each with its column, unit and rating, and the words that stand beside them. */
export function valuesOf(segment: Segment, run: Run): { found: Found[]; words: string } {
  const found: Found[] = [];
  let words = '';
  let ahead: { unit: NonNullable<Value['unit']>; printed: string } | null = null;
  let said: Role | null = null;
  let before: PageCell | null = null;
  const headed = run.columns.some((column) => column.role !== null || column.unit !== null || column.free !== null);
  for (const cell of segment.cells) {
    const column = columnOf(run.columns, cell);
    const last = found[found.length - 1];
    const unit = unitOnly(cell.phrase.text);
    if (column?.role === 'rating' && isRatingText(cell)) {
      for (const one of ratedBy(found, run, column))
        one.rating ??= cell.meaning.kind === 'rating' ? cell.meaning.rating : cell.phrase.text;
      before = cell;
      continue;
    }
    if (cell.meaning.kind === 'value' && column?.role !== 'method' && column?.role !== 'unit') {
      found.push({
        value: cell.meaning,
        cell,
        column,
        unit: cell.meaning.unit ?? column?.unit?.unit ?? ahead?.unit ?? null,
        unitFrom: cell.meaning.unit === null && column?.unit != null ? 'heading' : 'row',
        unitPrinted: cell.meaning.unitPrinted ?? column?.unit?.printed ?? ahead?.printed ?? null,
        rating: cell.meaning.rating,
        said,
      });
      said = null;
    } else if (
      unit !== null &&
      last !== undefined &&
      before === last.cell &&
      cell.phrase.x0 - last.cell.phrase.x1 < 3 * cell.phrase.size &&
      column?.role !== 'unit'
    ) {
      // A unit right behind its number outranks the unit over the column.
      [last.unit, last.unitPrinted, last.unitFrom] = [unit.unit, unit.printed, 'row'];
    } else if (unit !== null) {
      for (const one of column?.role === 'unit'
        ? found.filter((other) => other.unit === null)
        : last === undefined
          ? []
          : [last])
        if (one.unit === null) [one.unit, one.unitPrinted, one.unitFrom] = [unit.unit, unit.printed, 'row'];
      if (found.length === 0) ahead = unit;
    } else if (cell.meaning.kind === 'rating' && last !== undefined) {
      const owner =
        column?.role === 'rating' || column === null
          ? (found.find((one) => !NOT_RESULTS.has(one.column?.role ?? 'unknown') && one.said === null) ?? last)
          : last;
      const nearest = run.columns.filter((one) => one.role === 'rating').length > 1 ? last : owner;
      nearest.rating ??= cell.meaning.rating;
    } else if (cell.meaning.kind === 'text') {
      const role = roleOf(labelText(cell.phrase.text), false);
      if (role !== null && column?.role == null) said = role === 'result' ? null : role;
      else if (!headed && found.length > 0 && column === null) break;
      else words += ` ${cell.phrase.text}`;
    } else if (cell.meaning.kind === 'range') said = null;
    before = cell;
  }
  return { found, words };
}

/** Letters, words or Roman numerals that grade; a laboratory's own words are kept as printed. */
function isRatingText(cell: PageCell): boolean {
  return (
    cell.meaning.kind === 'rating' ||
    (cell.meaning.kind === 'text' &&
      cell.phrase.words.length <= 3 &&
      cell.phrase.text.length <= 24 &&
      /^[\p{L}+\- ]+$/u.test(cell.phrase.text))
  );
}

/** One rating column grades the whole row; of several, each grades the numbers since the one before. */
function ratedBy(found: readonly Found[], run: Run, column: RunColumn): readonly Found[] {
  const open = found.filter((one) => one.said === null && !NOT_RESULTS.has(one.column?.role ?? 'unknown'));
  const ratings = run.columns.filter((one) => one.role === 'rating').sort((a, b) => a.x0 - b.x0);
  if (ratings.length <= 1) return open;
  const before = ratings.findLast((one) => one.x0 < column.x0);
  return open.filter(
    (one) => one.cell.phrase.x0 < column.x0 && (before === undefined || one.cell.phrase.x0 > before.x0),
  );
}

function latest(columns: readonly RunColumn[]): string | null {
  const days = columns.flatMap((column) => (column.role === 'date' && column.day !== null ? [column.day] : []));
  const key = (day: string) => {
    const year = Number(/\b(19|20)\d\d\b/.exec(day)?.[0] ?? `20${/(\d\d)\s*$/.exec(day)?.[1] ?? '00'}`);
    const season = /spring|mar|apr|may/i.test(day)
      ? 1
      : /summer|jun|jul|aug/i.test(day)
        ? 2
        : /fall|autumn|sep|oct|nov/i.test(day)
          ? 3
          : 0;
    const month = Number(/^(\d{1,2})[/.-]/.exec(day)?.[1] ?? 0);
    return year * 100 + (month > 0 ? month : season * 3);
  };
  return days.sort((a, b) => key(b) - key(a))[0] ?? null;
}

type Choice = {
  taken: { one: Found; identity: Identity | null }[];
  not: NotTaken[];
  doubts: Remark[];
  position: number;
};

function nameOf(column: RunColumn | null): string | null {
  return column === null
    ? null
    : (column.identity.sampleId ?? column.identity.labNumber ?? column.identity.fieldName ?? column.free);
}

/** Samples side by side: at least two columns bear different names. */
function identityOver(column: RunColumn | null, samples: boolean): Identity | null {
  if (column === null || !samples) return null;
  const named = column.identity.sampleId ?? column.identity.labNumber ?? column.identity.fieldName;
  const day = column.day !== null && column.identity.dateSampled === undefined ? { dateSampled: column.day } : {};
  if (named !== undefined && (column.free === null || column.identity.sampleId !== undefined))
    return { ...column.identity, ...day };
  if (column.free === null) return null;
  // A code among the words over a column is the laboratory's number.
  const words = column.free.split(' ');
  const code = words.length > 1 ? words.find((word) => isCode(word)) : undefined;
  const sampleId = words.filter((word) => word !== code).join(' ');
  return { ...(code === undefined ? {} : { labNumber: code }), ...column.identity, sampleId, ...day };
}

function sideBySide(run: Run): boolean {
  const open = run.columns.filter(
    (column) => column.role === null || !NOT_RESULTS.has(column.role) || column.role === 'date',
  );
  const names = open.flatMap((column) => nameOf(column) ?? []);
  return (
    names.length >= 2 && new Set(names.map((name) => name.toLowerCase())).size >= 2 && names.length >= 0.5 * open.length
  );
}

/** Which of a row's numbers are results, for which sample, and of those left out the evidence. */
export function choose(found: readonly Found[], run: Run): Choice {
  const samples = sideBySide(run);
  const not: NotTaken[] = [];
  const last = samples ? null : latest(run.columns);
  const hasResult = run.columns.some((column) => column.role === 'result');
  const free: Found[] = [];
  for (const one of found) {
    const role = one.said ?? one.column?.role ?? null;
    const heading = one.column?.heading ?? '';
    if (role === 'date' && one.said === null) {
      if (!samples && (hasResult || one.column?.day !== last))
        not.push({ cell: one.cell, role: 'previous', why: `stands under "${heading}", an earlier day` });
      else free.push(one);
    } else if (role !== null && NOT_RESULTS.has(role))
      not.push({
        cell: one.cell,
        role,
        why: one.said !== null ? `the words before it say ${role}` : `stands under "${heading}"`,
      });
    else free.push(one);
  }
  if (samples) {
    const taken = free.flatMap((one) => {
      const identity = identityOver(one.column, true);
      if (identity === null) not.push({ cell: one.cell, role: 'several', why: 'no sample stands over it' });
      return identity === null ? [] : [{ one, identity }];
    });
    // Two numbers of one sample in a row are two units: which is which rests on the headings alone.
    const twice = new Set(taken.map(({ identity }) => identity.sampleId ?? identity.labNumber)).size < taken.length;
    return { taken, not, doubts: [], position: twice ? 0.94 : 0.98 };
  }
  const alone = (list: readonly Found[]) => list.map((one) => ({ one, identity: null }));
  const named = free.filter((one) => one.column?.role === 'result');
  // "Content" beside "Stock, kg/ha": a column with a unit of its own is the same amount said again.
  const again = free.filter(
    (one) =>
      one.column?.role === null &&
      one.column.unit !== null &&
      one.column.unit.unit !== 'index' &&
      named.some((other) => other.unit !== one.unit),
  );
  const open = named.length > 0 ? [...named, ...again] : free;
  for (const one of free)
    if (!open.includes(one))
      not.push({ cell: one.cell, role: 'several', why: 'another column is headed as the result' });
  if (open.length <= 1) return { taken: alone(open), not, doubts: [], position: named.length === 1 ? 1 : 0.99 };
  const units = open.map((one) => one.unit);
  if (units.every((unit) => unit !== null) && new Set(units).size === units.length)
    return { taken: alone(open), not, doubts: [], position: 0.94 };
  for (const one of open.slice(1))
    not.push({ cell: one.cell, role: 'several', why: 'no heading says which number is the result' });
  const doubt = remark(
    'several-numbers',
    `The line holds ${open.length} numbers and no heading says which is the result; the first was taken.`,
  );
  return { taken: alone(open.slice(0, 1)), not, doubts: [doubt], position: 0.6 };
}

/** "26.4" over "mg/kg" in the column of numbers. */
export function unitUnder(
  lines: readonly CellLine[],
  at: number,
  cell: PageCell,
): { unit: NonNullable<Value['unit']>; printed: string } | null {
  for (const line of lines.slice(at + 1, at + 4)) {
    if (line.line.page !== cell.phrase.page || line.line.y0 - cell.phrase.y1 > 0.8 * cell.phrase.size) return null;
    const under = line.cells.find((one) => overlapping(one.phrase, cell.phrase));
    if (under === undefined) continue;
    return unitOnly(under.phrase.text);
  }
  return null;
}

const ADVICE_UNIT = /^(lb\/acre|kg\/ha|ton\/acre|t\/ha|cwt\/acre|lb\/1000ft2|lb\/100ft2|oz\/|g\/m2)/;

/** P2O5, K2O or lime to spread, listed among the results: P or K was found in the same list in another unit. */
export function isAdvice(segment: Segment, unit: Value['unit'], run: Run): boolean {
  const { label } = segment;
  const text = label.text;
  if (label.analyte === 'lime_requirement')
    return !/requirement|index|\blr\b/i.test(text) && (unit === null || ADVICE_UNIT.test(unit));
  if (label.form !== 'P2O5' && label.form !== 'K2O') return false;
  const printed = segment.line.line.text;
  if (
    /P2O5/i.test(printed) &&
    /K2O/i.test(printed) &&
    /\bN\b|\blime\b/i.test(printed) &&
    (unit === null || ADVICE_UNIT.test(unit))
  )
    return true;
  const found = run.segments.some(
    (other) => other !== segment && other.label.analyte === label.analyte && other.label.form === 'element',
  );
  return found && (unit === null || ADVICE_UNIT.test(unit));
}
