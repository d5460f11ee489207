import type { SamplePart } from '../candidate';
import type { ReadRecommendation, Remark } from '../types';

export type Grid = readonly (readonly string[])[];

/** One sheet as a person sees it: hidden rows and columns are empty, so that the numbers of the rest stay true. */
export type Sheet = {
  /** From 1. */
  readonly number: number;
  readonly name: string | null;
  readonly grid: Grid;
  /** Merged cells, rows and columns from 0, ends included. */
  readonly merges: readonly Merge[];
};

export type Merge = { readonly top: number; readonly left: number; readonly bottom: number; readonly right: number };

/** Why a number of the file is no result. */
export type NotResult =
  | 'identity'
  | 'date'
  | 'depth'
  | 'desired'
  | 'previous'
  | 'recommendation'
  | 'limit'
  | 'difference'
  | 'summary-row'
  | 'row-without-heading'
  | 'column-without-analyte'
  | 'outside-table'
  | 'not-soil'
  | 'other-column';

/** What became of each cell, by "row:column" from 0. */
export type Ledger = Map<string, NotResult | 'taken'>;

export type Shape = {
  readonly parts: readonly SamplePart[];
  readonly recommendations: readonly ReadRecommendation[];
  /** Rows that belong to the table, so that the others can be read as titles and notes. */
  readonly rows: ReadonlySet<number>;
  readonly remarks: readonly Remark[];
  /** What rows of the table are when they are not soil; null when none is another thing. */
  readonly other: string | null;
};

export const keyOf = (row: number, column: number): string => `${row}:${column}`;

/** Null where nobody asks afterwards: a large file is read without it. */
export function note(ledger: Ledger | null, row: number, column: number, what: NotResult | 'taken') {
  if (ledger === null) return;
  const key = keyOf(row, column);
  if (what === 'taken' || !ledger.has(key)) ledger.set(key, what);
}
