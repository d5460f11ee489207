import type { Qualifier } from '@/lib/domain/analytes';

type FormCell = {
  readonly analyte: string | null;
  readonly unit: string | null;
  readonly value: number | string | null;
  readonly qualifier: Qualifier;
};

/**
 * True when a cell says what the sample above it says of the same analyte. Purpose: in one laboratory's data file 4 of 256
 * cells differed from its page, and each wrong one repeated the row above; by itself an equal number is chance, beside
 * another form that differs it says which of the two to look at. Errors: none.
 */
export function repeatsAbove(cell: FormCell, above: readonly FormCell[]): boolean {
  return above.some(
    (other) =>
      other.analyte === cell.analyte &&
      other.unit === cell.unit &&
      other.qualifier === cell.qualifier &&
      other.value !== null &&
      cell.value !== null &&
      Number(other.value) === Number(cell.value),
  );
}
