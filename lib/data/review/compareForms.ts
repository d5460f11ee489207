import { repeatsAbove } from '@/lib/reading/checks/forms';
import type { RowColumns } from './reviewRow';

export type CellDifference = {
  analyte: string;
  unit: string | null;
  rowId: string | null;
  here: string | null;
  there: string | null;
  /** The side whose number is that of the sample above it: the one to look at first. */
  repeats: 'here' | 'there' | null;
};
export type FormComparison = { shared: number; equal: number; differences: CellDifference[] };

type Row = Pick<RowColumns, 'id' | 'analyte' | 'unit' | 'form' | 'value' | 'qualifier' | 'printed' | 'state'>;

const counted = (rows: readonly Row[]) => rows.filter((row) => row.state !== 'removed' && row.analyte !== null);

const sameNumber = (a: Row, b: Row): boolean =>
  a.qualifier === b.qualifier &&
  (a.value === null ? null : Number(a.value)) === (b.value === null ? null : Number(b.value));

/** A form that leaves the unit or the element's form out is taken to mean the other one's. */
const agrees = (a: string | null, b: string | null) => a === null || b === null || a === b;

/** The samples that stand above the two that are compared. */
export type Above = { readonly here: readonly Row[]; readonly there: readonly Row[] };
const NOTHING_ABOVE: Above = { here: [], there: [] };

function repeating(row: Row, other: Row, above: Above): CellDifference['repeats'] {
  const [here, there] = [repeatsAbove(row, above.here), repeatsAbove(other, above.there)];
  return here === there ? null : here ? 'here' : 'there';
}

/** Two forms of what may be one analysis, cell by cell. A cell that one side lacks is a difference, but no disagreement. */
export function compareForms(here: readonly Row[], there: readonly Row[], above = NOTHING_ABOVE): FormComparison {
  const left = counted(there);
  const differences: CellDifference[] = [];
  let shared = 0;
  let equal = 0;
  for (const row of counted(here)) {
    const fits = (other: Row) =>
      other.analyte === row.analyte && agrees(other.unit, row.unit) && agrees(other.form, row.form);
    const at = left.findIndex((other) => fits(other) && other.unit === row.unit);
    const found = at >= 0 ? at : left.findIndex(fits);
    const cell = { analyte: row.analyte ?? '', unit: row.unit, rowId: row.id, here: row.printed };
    const other = found >= 0 ? left.splice(found, 1)[0] : undefined;
    if (!other) {
      differences.push({ ...cell, there: null, repeats: null });
      continue;
    }
    shared += 1;
    if (sameNumber(row, other)) equal += 1;
    else differences.push({ ...cell, there: other.printed, repeats: repeating(row, other, above) });
  }
  for (const other of left) {
    const cell = { analyte: other.analyte ?? '', unit: other.unit, rowId: null, here: null };
    differences.push({ ...cell, there: other.printed, repeats: null });
  }
  return { shared, equal, differences };
}

export type Identity = {
  plotId: string | null;
  takenOn: string | null;
  labNumber: string | null;
  laboratoryId: string | null;
};

const plain = (text: string | null) => text?.replace(/\s+/g, '').toLowerCase() || null;

/** Four cells in five: a data file and its page have been seen to disagree in a few, each repeating the row above. */
const MOSTLY = 0.8;

/**
 * One analysis in two forms: the same laboratory number, or the same plot and day, nothing that speaks against it, and
 * mostly the same numbers. Two bags of a plot have numbers of their own and stay two.
 */
export function looksLikeTheSame(a: Identity, b: Identity, compared: FormComparison): boolean {
  const numbers = [plain(a.labNumber), plain(b.labNumber)];
  const sameNumbered = numbers[0] !== null && numbers[0] === numbers[1];
  const samePlace = a.plotId !== null && a.plotId === b.plotId && a.takenOn !== null && a.takenOn === b.takenOn;
  if (!sameNumbered && !samePlace) return false;
  const against =
    !agrees(a.plotId, b.plotId) ||
    !agrees(a.takenOn, b.takenOn) ||
    !agrees(a.laboratoryId, b.laboratoryId) ||
    !agrees(numbers[0] ?? null, numbers[1] ?? null);
  return !against && compared.shared > 0 && compared.equal >= MOSTLY * compared.shared;
}
