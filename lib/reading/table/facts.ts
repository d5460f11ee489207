import type { Label } from '../labels/label';
import type { CellMeaning, NumberStyle } from '../stages/values';
import { readTableCell } from './cell';
import { fieldOf } from './fields';
import { labelOf } from './spoken';
import type { Grid, Sheet } from './types';

/** What each row is made of, counted once. */
export type RowFacts = {
  readonly filled: number;
  readonly values: number;
  readonly dates: number;
  /** Columns whose cell names an analyte, and how many different ones. */
  readonly labels: readonly number[];
  readonly analytes: number;
  readonly fields: number;
};

export type Facts = {
  readonly sheet: Sheet;
  readonly grid: Grid;
  readonly style: NumberStyle;
  readonly width: number;
  readonly rows: readonly RowFacts[];
  at(row: number, column: number): string;
  meaning(row: number, column: number): CellMeaning;
  label(row: number, column: number): Label | null;
};

const PLAIN_NUMBER = /^[<>]?\s?[\d.,]+$/;

/** Everything asked of a sheet's cells again and again, remembered by their text. */
export function factsOf(sheet: Sheet, style: NumberStyle): Facts {
  const meanings = new Map<string, CellMeaning>();
  const labels = new Map<string, Label | null>();
  const at = (row: number, column: number) => sheet.grid[row]?.[column] ?? '';
  const meaningOf = (text: string): CellMeaning => {
    const known = meanings.get(text);
    if (known !== undefined) return known;
    const meaning = readTableCell(text, style);
    if (meanings.size < 200_000) meanings.set(text, meaning);
    return meaning;
  };
  const labelAt = (text: string): Label | null => {
    if (text === '' || PLAIN_NUMBER.test(text)) return null;
    const known = labels.get(text);
    if (known !== undefined) return known;
    const label = fieldOf(text) === null ? labelOf(text) : null;
    if (labels.size < 200_000) labels.set(text, label);
    return label;
  };
  const rows = sheet.grid.map((cells): RowFacts => {
    let [filled, values, dates, fields] = [0, 0, 0, 0];
    for (const cell of cells) {
      if (cell === '') continue;
      filled += 1;
      const kind = meaningOf(cell).kind;
      if (kind === 'value') values += 1;
      else if (kind === 'date') dates += 1;
    }
    // A row of many numbers has its few names in places that the tables look at themselves.
    const look = filled > 0 && values <= Math.max(1, 0.5 * filled);
    const found = look ? cells.flatMap((cell, column) => (labelAt(cell) === null ? [] : [column])) : [];
    if (look) for (const cell of cells) if (cell !== '' && fieldOf(cell) !== null) fields += 1;
    const analytes = new Set(found.map((column) => labelAt(cells[column] ?? '')?.analyte)).size;
    return { filled, values, dates, labels: found, analytes, fields };
  });
  const width = sheet.grid.reduce((most, row) => Math.max(most, row.length), 0);
  return {
    sheet,
    grid: sheet.grid,
    style,
    width,
    rows,
    at,
    meaning: (row, column) => meaningOf(at(row, column)),
    label: (row, column) => labelAt(at(row, column)),
  };
}
