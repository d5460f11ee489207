import type { Candidate, Identity, SamplePart } from '../candidate';
import { type Label, methodIn, readLabel, unitOnly } from '../labels/label';
import { fieldOf, fieldWithValue } from '../stages/identity';
import { NOT_A_SAMPLE, type Role, roleOf } from '../stages/roles';
import { type NumberStyle, ratingIn, readCell } from '../stages/values';
import type { ReadRecommendation } from '../types';
import type { Grid } from './grid';
import { type HeaderRow, spoken } from './headings';

export type Shape = { readonly parts: readonly SamplePart[]; readonly recommendations: readonly ReadRecommendation[] };

type At = { row: number; column: number };

function candidate(
  label: Label,
  text: string,
  at: At,
  style: NumberStyle,
  more: { unit?: string; method?: string; rating?: string | null },
): Candidate | null {
  const meaning = readCell(text, style);
  if (meaning.kind !== 'value') return null;
  const unit = more.unit === undefined ? null : unitOnly(more.unit);
  const method = more.method === undefined ? null : methodIn(label.analyte, more.method);
  const settled = unit?.unit === '%' && label.unit === null ? (readLabel(`${label.text} %`) ?? label) : label;
  return {
    label: settled,
    value: meaning,
    rating: meaning.rating ?? more.rating ?? null,
    unit: meaning.unit ?? unit?.unit ?? label.unit,
    unitPrinted: meaning.unitPrinted ?? unit?.printed ?? label.unitPrinted,
    method: method?.method ?? label.method,
    methodPrinted: method === null ? label.methodPrinted : (more.method ?? method.printed),
    page: null,
    box: null,
    cell: { sheet: 1, row: at.row + 1, column: at.column + 1 },
    position: 1,
    doubts: [],
  };
}

/** Title rows above a table: "Reported,2024-10-12" or "Reported: 2024-10-12". */
export function titleIdentity(grid: Grid, rows: number): Identity {
  const identity: Identity = {};
  for (const row of grid.slice(0, rows)) {
    for (const [column, cell] of row.entries()) {
      const whole = fieldWithValue(cell);
      const field = whole?.field ?? fieldOf(cell);
      const value = whole?.value ?? row[column + 1] ?? '';
      if (field !== null && value !== '' && fieldOf(value) === null) identity[field] ??= value;
    }
  }
  return identity;
}

/** One row a sample, one column an analyte. */
export function matrixShape(grid: Grid, header: HeaderRow, style: NumberStyle): Shape {
  const parts: SamplePart[] = [];
  const recommendations: ReadRecommendation[] = [];
  for (let row = header.dataFrom; row < grid.length; row++) {
    const cells = grid[row] ?? [];
    if (cells.every((cell) => cell === '')) continue;
    const identity: Identity = {};
    for (const heading of header.headings) {
      const cell = cells[heading.column] ?? '';
      if (heading.field !== null && cell !== '')
        identity[heading.field] ??=
          /\b(in|inches|cm)\b/i.test(heading.text) && heading.field === 'depth' && !/[a-z"]/i.test(cell)
            ? `${cell} ${/cm/i.test(heading.text) ? 'cm' : 'in'}`
            : cell;
    }
    const name = identity.sampleId ?? identity.labNumber ?? cells[0] ?? '';
    if (NOT_A_SAMPLE.test(name) || NOT_A_SAMPLE.test(cells.find((cell) => cell !== '') ?? '')) continue;
    if (
      identity.sampleId === undefined &&
      identity.labNumber === undefined &&
      header.headings[0]?.label === null &&
      header.headings[0].field === null &&
      (cells[0] ?? '') !== ''
    )
      identity.sampleId = cells[0] ?? '';
    const candidates: Candidate[] = [];
    for (const [index, heading] of header.headings.entries()) {
      const cell = cells[heading.column] ?? '';
      if (heading.label === null || cell === '') continue;
      if (heading.role === 'recommendation') {
        const meaning = readCell(cell, style);
        if (meaning.kind === 'value')
          recommendations.push({
            sampleId: identity.sampleId ?? null,
            item: heading.text,
            amount: meaning.value,
            printed: cell,
            unit: heading.label.unit,
            page: null,
            box: null,
          });
        continue;
      }
      if (heading.role !== null) continue;
      const next = header.headings[index + 1];
      const rating =
        next !== undefined && next.label === null && next.field === null ? ratingIn(cells[next.column] ?? '') : null;
      const found = candidate({ ...heading.label, text: heading.text }, cell, { row, column: heading.column }, style, {
        rating,
      });
      if (found !== null) candidates.push(found);
    }
    if (candidates.length > 0) parts.push({ identity, candidates });
  }
  return { parts, recommendations };
}

const LONG_ANALYTE =
  /^(analyte|test|parameter|element|determination|test ?name|analysis|nutrient|property|measurement|component)( name| code)?$/i;
const LONG_VALUE = /^(results?|value|test ?value|result ?value|concentration|test ?result|measured ?value|reading)$/i;

/** One row a number: sample, analyte, result, unit, method. */
export function longShape(grid: Grid, style: NumberStyle): { shape: Shape; header: number } | null {
  for (const [at, row] of grid.slice(0, 40).entries()) {
    const names = row.map((cell) => spoken(cell));
    const analyteAt = names.findIndex((name) => LONG_ANALYTE.test(name));
    const valueAt = names.findIndex((name) => LONG_VALUE.test(name));
    if (analyteAt < 0 || valueAt < 0 || !names.some((name) => fieldOf(name) !== null)) continue;
    const unitAt = names.findIndex((name) => roleOf(name, false) === 'unit');
    const methodAt = names.findIndex((name) => roleOf(name, false) === 'method');
    const ratingAt = names.findIndex((name) => roleOf(name, false) === 'rating');
    const qualifierAt = names.findIndex((name) => /^(qualifier|flag|sign)$/i.test(name));
    const parts: SamplePart[] = [];
    for (let index = at + 1; index < grid.length; index++) {
      const cells = grid[index] ?? [];
      const label = readLabel(spoken(cells[analyteAt] ?? ''));
      if (label === null) continue;
      const identity: Identity = {};
      for (const [column, name] of names.entries()) {
        const field = fieldOf(name);
        if (field !== null && (cells[column] ?? '') !== '') identity[field] ??= cells[column] ?? '';
      }
      const sign = qualifierAt >= 0 && /^[<>]$/.test(cells[qualifierAt] ?? '') ? (cells[qualifierAt] ?? '') : '';
      const more = {
        ...(unitAt >= 0 ? { unit: cells[unitAt] ?? '' } : {}),
        ...(methodAt >= 0 ? { method: cells[methodAt] ?? '' } : {}),
        rating: ratingAt >= 0 ? ratingIn(cells[ratingAt] ?? '') : null,
      };
      const found = candidate(
        { ...label, text: cells[analyteAt] ?? '' },
        sign + (cells[valueAt] ?? ''),
        { row: index, column: valueAt },
        style,
        more,
      );
      if (found !== null) parts.push({ identity, candidates: [found] });
    }
    if (parts.length > 0) return { shape: { parts, recommendations: [] }, header: at };
  }
  return null;
}

type ListColumn = { readonly column: number; readonly role: Role | null; readonly identity: Identity };

function listColumns(grid: Grid, labelAt: number, first: number, last: number): ListColumn[] {
  const width = Math.max(...grid.map((row) => row.length));
  const columns: ListColumn[] = [];
  for (let column = labelAt + 1; column < width; column++) {
    const above = grid
      .slice(Math.max(0, first - 3), first)
      .map((row) => row[column] ?? '')
      .filter((cell) => cell !== '');
    const role =
      above
        .map((cell) => roleOf(cell, false) ?? (unitOnly(cell) === null ? null : 'result'))
        .find((found) => found !== null) ?? null;
    const identity: Identity = {};
    for (const [at, row] of grid.entries()) {
      const field = at <= last ? fieldOf(row[labelAt] ?? '') : null;
      if (field !== null && (row[column] ?? '') !== '') identity[field] ??= row[column] ?? '';
    }
    columns.push({ column, role, identity });
  }
  return columns;
}

/** One row an analyte; the numbers of one sample beside it, or of several samples across. */
export function listShape(grid: Grid, style: NumberStyle): Shape | null {
  const width = Math.min(20, Math.max(0, ...grid.map((row) => row.length)));
  let labelAt = -1;
  let rows: number[] = [];
  for (let column = 0; column < width; column++) {
    const found = grid.flatMap((row, at) =>
      readLabel(spoken(row[column] ?? '')) !== null &&
      row.slice(column + 1).some((cell) => readCell(cell, style).kind === 'value')
        ? [at]
        : [],
    );
    if (found.length > rows.length) [labelAt, rows] = [column, found];
  }
  const [first, last] = [rows[0], rows[rows.length - 1]];
  if (first === undefined || last === undefined || rows.length < 2) return null;
  const columns = listColumns(grid, labelAt, first, last);
  const unitAt =
    columns.find((one) => one.role === 'unit')?.column ??
    columns.find(
      (one) => rows.filter((row) => unitOnly(grid[row]?.[one.column] ?? '') !== null).length >= rows.length / 2,
    )?.column;
  const methodAt = columns.find((one) => one.role === 'method')?.column;
  const ratingAt = columns.find((one) => one.role === 'rating')?.column;
  const numeric = columns.filter(
    (one) =>
      one.column !== unitAt &&
      one.column !== methodAt &&
      rows.some((row) => readCell(grid[row]?.[one.column] ?? '', style).kind === 'value'),
  );
  const named = numeric.filter((one) => one.role === 'result');
  const across =
    named.length === 0
      ? numeric.filter(
          (one) => one.role === null && (one.identity.sampleId !== undefined || one.identity.labNumber !== undefined),
        )
      : [];
  const chosen =
    named.length > 0
      ? named.slice(0, 1)
      : across.length > 1
        ? across
        : numeric.filter((one) => one.role === null).slice(0, 1);
  const parts = chosen.map((one): SamplePart => {
    const candidates = rows.flatMap((row) => {
      const cells = grid[row] ?? [];
      const label = readLabel(spoken(cells[labelAt] ?? ''));
      if (label === null) return [];
      const more = {
        ...(unitAt === undefined ? {} : { unit: cells[unitAt] ?? '' }),
        ...(methodAt === undefined ? {} : { method: cells[methodAt] ?? '' }),
        rating: ratingAt === undefined ? null : ratingIn(cells[ratingAt] ?? ''),
      };
      return (
        candidate(
          { ...label, text: cells[labelAt] ?? '' },
          cells[one.column] ?? '',
          { row, column: one.column },
          style,
          more,
        ) ?? []
      );
    });
    return { identity: one.identity, candidates };
  });
  return { parts, recommendations: [] };
}
