import { type Candidate, type Identity, remark, type SamplePart } from '../candidate';
import { readLabel, unitOnly } from '../labels/label';
import { type CellLine, isUnitOf, numberBox, type PageCell } from './cells';
import type { Column } from './columns';
import { isCode } from './identity';
import type { NotTaken } from './notTaken';
import { JUST_RESULT, NOT_A_SAMPLE, roleOf } from './roles';
import { columnAt, isRatingRow, isTail, type Table } from './tables';
import { storedBox } from './words';
import { earlierYears } from './years';

export type AdviceCell = { readonly sampleKey: Identity; readonly column: Column; readonly cell: PageCell };

export type TableRow = SamplePart & { readonly line: CellLine; readonly advice: readonly AdviceCell[] };

function ratingFor(row: CellLine, cell: PageCell, columns: readonly Column[]): string | null {
  const index = row.cells.indexOf(cell);
  const next = row.cells[index + 1];
  if (next?.meaning.kind !== 'rating') return null;
  const between = columns.some(
    (column) => column.label !== null && column.x0 > cell.phrase.x1 && column.x1 < next.phrase.x0,
  );
  return between ? null : next.meaning.rating;
}

/** Confidence where some columns of numbers have no meaning: the headings may be a column off. */
const UNEXPLAINED = 0.95;

/** Two or more columns of numbers, and a seventh of all, whose headings say nothing. */
function unexplained(table: Table): boolean {
  const silent = table.columns.filter(
    (column) =>
      column.label === null &&
      column.field === null &&
      column.role === null &&
      table.rows.filter((row) =>
        row.cells.some((cell) => cell.meaning.kind === 'value' && columnAt(table.columns, cell) === column),
      ).length >=
        0.5 * table.rows.length,
  );
  return silent.length >= 2 && silent.length >= table.columns.length / 7;
}

/** "lb/A" or "ppm" at the head of a row is the unit of its numbers. */
function rowUnit(row: CellLine, table: Table): ReturnType<typeof unitOnly> {
  const [first] = row.cells;
  if (first === undefined || first.meaning.kind === 'value' || columnAt(table.columns, first)?.label != null)
    return null;
  return unitOnly(first.phrase.text);
}

function candidateOf(
  row: CellLine,
  cell: PageCell,
  column: Column,
  table: Table,
  under: string | null,
): Candidate | null {
  if (cell.meaning.kind !== 'value' || column.label === null) return null;
  const behind = row.cells[row.cells.indexOf(cell) + 1];
  const unitOfRow = behind !== undefined && isUnitOf(cell, behind) ? unitOnly(behind.phrase.text) : rowUnit(row, table);
  const shared = unitOfRow?.unit === '%' ? readLabel(`${column.label.text} %`) : null;
  const label = shared?.analyte.startsWith('sat_') && column.label.unit === null ? shared : column.label;
  const value = cell.meaning;
  return {
    label: { ...label, text: column.heading },
    value,
    rating: value.rating ?? ratingFor(row, cell, table.columns) ?? under,
    unit: value.unit ?? unitOfRow?.unit ?? label.unit,
    unitPrinted: value.unitPrinted ?? unitOfRow?.printed ?? label.unitPrinted,
    method: label.method,
    methodPrinted: label.methodPrinted,
    page: row.line.page.number,
    box: storedBox(row.line.page, numberBox(cell.phrase, value.span)),
    cell: null,
    position: column.position * (table.borrowed ? 0.95 : 1) * (unexplained(table) ? UNEXPLAINED : 1),
    doubts: table.borrowed
      ? [remark('header-on-page-before', 'The headings of this column stand on the page before.')]
      : [],
  };
}

function rowIdentity(row: CellLine, table: Table): Identity {
  const identity: Identity = {};
  for (const cell of row.cells) {
    const column = columnAt(table.columns, cell);
    if (column === undefined) continue;
    const first = table.columns.find((other) => other.label === null && other.role !== 'recommendation');
    const field =
      column.field ??
      (column === first && cell.meaning.kind === 'text' && !table.columns.some((other) => other.field === 'sampleId')
        ? 'sampleId'
        : null);
    if (field !== null && !JUST_RESULT.test(cell.phrase.text) && unitOnly(cell.phrase.text) === null)
      identity[field] = identity[field] === undefined ? cell.phrase.text : `${identity[field]} ${cell.phrase.text}`;
  }
  return identity;
}

/** A column whose cells say what each row is: "Found", "Desired", "Mar 2025". */
function rowKinds(table: Table): ReadonlyMap<CellLine, string> {
  for (const column of table.columns) {
    if (column.label !== null) continue;
    const said = table.rows.flatMap((row) => {
      const cell = row.cells.find((one) => columnAt(table.columns, one) === column);
      return cell === undefined ? [] : [{ row, text: cell.phrase.text }];
    });
    const roles = said.filter(({ text }) => JUST_RESULT.test(text) || roleOf(text, false) !== null);
    const results = roles.filter(({ text }) => JUST_RESULT.test(text) || roleOf(text, false) === 'result');
    if (results.length >= 1 && roles.length > results.length && roles.length >= 0.5 * said.length)
      return new Map(said.map(({ row, text }) => [row, text]));
  }
  return new Map();
}

/** Name and number of a plot whose years stand under one another: the name is beside the first, its number may be beside the next. */
function plotIdentity(plot: readonly CellLine[], own: CellLine, table: Table): Identity {
  const parts = plot.map((row) => rowIdentity(row, table));
  const names = parts.flatMap((part) => part.sampleId ?? []);
  const code = names.find((name) => isCode(name));
  const sampleId = names.find((name) => name !== code);
  const { sampleId: _name, ...rest } = rowIdentity(own, table);
  return {
    ...(code === undefined ? {} : { labNumber: code }),
    ...rest,
    ...(sampleId === undefined ? {} : { sampleId }),
  };
}

/** The samples of a table, row by row, with their numbers; what is left out goes to `notTaken` with its evidence. */
export function rowsOfTable(table: Table, notTaken: NotTaken[] = []): TableRow[] {
  const rows: TableRow[] = [];
  const kinds = rowKinds(table);
  const years = earlierYears(table, (cell) => columnAt(table.columns, cell));
  for (const [index, row] of table.rows.entries()) {
    const last = rows[rows.length - 1];
    if (isRatingRow(row)) continue;
    const kind = kinds.get(row) ?? years.earlier.get(row);
    if (kind !== undefined && !JUST_RESULT.test(kind) && roleOf(kind, false) !== 'result' && row.values > 0) {
      notTaken.push(
        ...row.cells
          .filter((cell) => cell.meaning.kind === 'value')
          .map((cell) => ({ cell, role: roleOf(kind, false) ?? ('previous' as const), why: `its row says "${kind}"` })),
      );
      continue;
    }
    if (last !== undefined && isTail(row, table.columns) && row.line.y0 - last.line.line.y1 < 1.2 * row.line.size) {
      const tail = row.cells.map((cell) => cell.phrase.text).join(' ');
      const before = last.identity.sampleId;
      const code = before !== undefined && last.identity.labNumber === undefined && isCode(tail);
      rows[rows.length - 1] = {
        ...last,
        identity: code
          ? { ...last.identity, labNumber: tail }
          : { ...last.identity, sampleId: before === undefined ? tail : `${before} ${tail}` },
      };
      continue;
    }
    const plot = years.groups.find((group) => group.includes(row));
    const identity = plot === undefined || plot.length < 2 ? rowIdentity(row, table) : plotIdentity(plot, row, table);
    const [first] = row.cells;
    const lead = first === undefined || columnAt(table.columns, first)?.label != null ? '' : first.phrase.text;
    const name = identity.sampleId ?? identity.labNumber ?? lead;
    if (NOT_A_SAMPLE.test(name)) {
      notTaken.push(
        ...row.cells
          .filter((cell) => cell.meaning.kind === 'value')
          .map((cell) => ({
            cell,
            role: roleOf(name, false) ?? ('several' as const),
            why: `its row is headed "${name}"`,
          })),
      );
      continue;
    }
    const [before, next] = [table.rows[index - 1], table.rows[index + 1]];
    // Two rows of one sample in two units share the ratings between them.
    const shared = before !== undefined && isRatingRow(before) && rowUnit(row, table) !== null ? before : null;
    const ratings = next !== undefined && isRatingRow(next) ? next : shared;
    const candidates: Candidate[] = [];
    const advice: AdviceCell[] = [];
    for (const cell of row.cells) {
      const column = columnAt(table.columns, cell);
      if (column === undefined || cell.meaning.kind !== 'value') continue;
      if (column.role === 'recommendation') advice.push({ sampleKey: identity, column, cell });
      if (column.label === null || column.role !== null) {
        if (column.role !== null && column.role !== 'rating')
          notTaken.push({ cell, role: column.role, why: `stands under "${column.heading}"` });
        continue;
      }
      const under = ratings?.cells.find((other) => columnAt(table.columns, other) === column);
      const candidate = candidateOf(
        row,
        cell,
        column,
        table,
        under?.meaning.kind === 'rating'
          ? under.meaning.rating
          : under?.meaning.kind === 'text'
            ? under.phrase.text
            : null,
      );
      if (candidate !== null) candidates.push(candidate);
    }
    rows.push({ identity, candidates, line: row, advice });
  }
  return rows.filter((row) => row.candidates.length > 0);
}
