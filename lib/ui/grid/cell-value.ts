import type { GridColumn, GridRow } from './types';

const READABLE_NUMBER = /^(?:[<>]=?|≤|≥)?\s*[-+]?(?:\d{1,3}(?:[ ,]\d{3})+(?:\.\d+)?|\d+(?:[.,]\d+)?|[.,]\d+)\s*%?$/;
const WORDS_FOR_NONE = /^(?:n\.?d\.?|trace|tr|bdl|<?\s*dl)$/i;

/** What goes into the cell: trimmed, and for a choice the option's value when its label was typed or pasted. */
export function tidyValue(column: GridColumn, typed: string): string {
  const trimmed = typed.trim();
  if (column.kind !== 'select') return trimmed;
  const wanted = trimmed.toLowerCase();
  const option = column.options?.find(
    (one) => one.value.toLowerCase() === wanted || one.label.toLowerCase() === wanted,
  );
  return option ? option.value : trimmed;
}

/** A sentence when the value cannot be saved, null when it can. An empty cell is always a possible answer. */
export function faultOf(column: GridColumn, value: string): string | null {
  if (column.validate) return column.validate(value);
  if (value === '') return null;
  if (column.kind === 'number' && !READABLE_NUMBER.test(value) && !WORDS_FOR_NONE.test(value)) {
    return 'Not a number. Write it like 6.4, <0.1 or nd.';
  }
  if (column.kind === 'select' && !column.options?.some((one) => one.value === value)) {
    return 'Not one of the choices. Press Enter and pick one.';
  }
  return null;
}

/** The column as this row sees it: a row may have choices of its own. */
export function columnFor(column: GridColumn | undefined, row: GridRow | undefined): GridColumn | undefined {
  const own = column && row?.options?.[column.id];
  return own ? { ...column, options: own } : column;
}

export function labelOf(column: GridColumn, value: string): string {
  if (column.kind !== 'select') return value;
  return column.options?.find((one) => one.value === value)?.label ?? value;
}

export function isEditable(column: GridColumn | undefined, row: GridRow | undefined, gridReadOnly: boolean): boolean {
  return !gridReadOnly && column !== undefined && row !== undefined && column.kind !== 'readonly' && !row.readOnly;
}

export function rowHeaderOf(columns: readonly GridColumn[]): GridColumn | undefined {
  return columns.find((column) => column.rowHeader) ?? columns[0];
}
