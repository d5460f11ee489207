import type { AnalyteKey, MethodKey, UnitKey } from '@/lib/domain/analytes';
import type { DateOrder } from '../stages/dates';
import type { Reading, Remark } from '../types';

/** A sheet of the grower's own workbook or CSV as plain rows. */
export type OwnRows = {
  /** From 1. */
  readonly number: number;
  readonly name: string | null;
  readonly rows: readonly (readonly string[])[];
};

/** One row a sample with a column for each analyte, or one row a number. */
export type OwnLayout = 'sample-per-row' | 'number-per-row';

/** What the grower says a column holds. */
export type ColumnMeaning =
  | { readonly kind: 'skip' }
  | { readonly kind: 'sample-name' }
  | { readonly kind: 'field-name' }
  | { readonly kind: 'lab-number' }
  | { readonly kind: 'laboratory' }
  | { readonly kind: 'date-sampled' }
  | { readonly kind: 'depth'; readonly unit: 'in' | 'cm' | null }
  | { readonly kind: 'depth-top'; readonly unit: 'in' | 'cm' | null }
  | { readonly kind: 'depth-bottom'; readonly unit: 'in' | 'cm' | null }
  /** Only in 'sample-per-row'. `form` is "element", "P2O5", "K2O" …, null where the question does not arise. */
  | {
      readonly kind: 'result';
      readonly analyte: AnalyteKey;
      readonly unit: UnitKey | null;
      readonly form: string | null;
      readonly method: MethodKey | null;
    }
  /** Only in 'number-per-row'. */
  | { readonly kind: 'analyte' }
  | { readonly kind: 'value' }
  | { readonly kind: 'unit' }
  | { readonly kind: 'method' };

export type OwnColumn = {
  /** From 1. */
  readonly column: number;
  readonly heading: string;
  /** A few cells of the column, so that a person knows which one it is. */
  readonly examples: readonly string[];
  readonly meaning: ColumnMeaning;
};

export type OwnMapping = {
  readonly layout: OwnLayout;
  /** Number of the sheet, from 1. */
  readonly sheet: number;
  /** The row of the headings, from 1; 0 when there is none. */
  readonly headingRow: number;
  readonly columns: readonly OwnColumn[];
  /** How "3/4/2024" is meant where the column leaves it open. */
  readonly dateOrder: DateOrder;
  readonly decimalComma: boolean;
};

export type ProposedMapping =
  | { readonly ok: true; readonly mapping: OwnMapping; readonly doubts: readonly Remark[] }
  | { readonly ok: false; readonly reason: 'no-rows' | 'no-results' };

export type RowProblem = {
  /** Row and column of the sheet, from 1; column null when the whole row is meant. */
  readonly row: number;
  readonly column: number | null;
  readonly text: string;
  readonly code:
    | 'name-missing'
    | 'date-missing'
    | 'date-unreadable'
    | 'date-impossible'
    | 'date-ambiguous'
    | 'depth-unit-missing'
    | 'not-a-number'
    | 'analyte-unknown'
    | 'unit-unknown'
    | 'method-unknown'
    | 'row-twice';
  readonly sentence: string;
  /** True when nothing of the cell, or of the row, was taken because of it. */
  readonly leftOut: boolean;
};

export type AppliedMapping = {
  /** Every row of it bears the doubt code 'typed-by-grower'; confidence is 1 because nothing was guessed. */
  readonly reading: Reading;
  readonly problems: readonly RowProblem[];
  readonly counts: {
    readonly rows: number;
    readonly samples: number;
    readonly results: number;
    readonly leftOut: number;
  };
};
