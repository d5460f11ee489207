import type { AnalyteKey, MethodKey, UnitKey } from '@/lib/domain/analytes';
import type { Box, Cell } from '../types';
import { plainLabel } from './layout';

/** What one printed label meant in a report that a person confirmed. null: the person left that open too. */
export type Lesson = {
  /** The label in plain words, as `plainLabel` makes it. */
  readonly label: string;
  readonly labelPrinted: string;
  readonly analyte: AnalyteKey;
  readonly method: MethodKey | null;
  readonly unit: UnitKey | null;
  readonly form: string | null;
  /** Where the results stood: middle of the numbers as fractions of the page's width, or columns of the data file. */
  readonly columns: readonly number[];
};

/** The lessons of one confirmed report and the day of its confirmation. */
export type ReportLessons = { readonly on: string; readonly lessons: readonly Lesson[] };

/** What is known of a layout: per label the newest confirmation that had it. */
export type Memory = ReadonlyMap<string, ReportLessons>;

export type ConfirmedRow = {
  readonly label: string;
  readonly analyte: AnalyteKey | null;
  readonly method: MethodKey | null;
  readonly unit: UnitKey | null;
  readonly form: string | null;
  readonly box: Box | null;
  readonly cell: Cell | null;
  /** A row that was taken out of the review teaches nothing. */
  readonly removed: boolean;
};

/** More places than this in one report are samples side by side, and no column of results. */
const MOST_COLUMNS = 12;

/** Where a number stands: the middle of its box to a hundredth of the page, or its column in a data file. */
export function columnOf(row: { readonly box: Box | null; readonly cell: Cell | null }): number | null {
  if (row.box !== null) return Math.round(((row.box[0] + row.box[2]) / 2) * 100) / 100;
  return row.cell === null ? null : row.cell.column;
}

const agrees = <T>(a: T | null, b: T | null) => a === null || b === null || a === b;

/**
 * What a confirmed review teaches: each label that the page prints, with what the person let stand beside it. Rows typed
 * in without a label and rows taken out teach nothing. Of two rows of one label that say the same, the fuller one is kept.
 */
export function lessonsOf(rows: readonly ConfirmedRow[]): Lesson[] {
  const lessons: Lesson[] = [];
  for (const row of rows) {
    const label = plainLabel(row.label);
    if (row.removed || row.analyte === null || label === '') continue;
    const place = columnOf(row);
    const at = lessons.findIndex(
      (one) =>
        one.label === label &&
        one.analyte === row.analyte &&
        agrees(one.unit, row.unit) &&
        agrees(one.method, row.method) &&
        agrees(one.form, row.form),
    );
    const before = lessons[at];
    const columns = [...new Set([...(before?.columns ?? []), ...(place === null ? [] : [place])])].slice(
      0,
      MOST_COLUMNS,
    );
    const lesson: Lesson = {
      label,
      labelPrinted: before?.labelPrinted ?? row.label,
      analyte: row.analyte,
      method: before?.method ?? row.method,
      unit: before?.unit ?? row.unit,
      form: before?.form ?? row.form,
      columns,
    };
    if (at < 0) lessons.push(lesson);
    else lessons[at] = lesson;
  }
  return lessons;
}

/** Newest confirmation first; for each label the newest one that had it decides alone. */
export function memoryOf(newestFirst: readonly ReportLessons[]): Memory {
  const memory = new Map<string, ReportLessons>();
  for (const { on, lessons } of newestFirst) {
    for (const label of new Set(lessons.map((one) => one.label))) {
      if (!memory.has(label)) memory.set(label, { on, lessons: lessons.filter((one) => one.label === label) });
    }
  }
  return memory;
}
