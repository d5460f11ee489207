import { clean } from '@/lib/reading/labels/normal';
import { decode } from '@/lib/reading/table/decode';
import { gridOf } from '@/lib/reading/table/grid';
import { refusal } from '@/lib/services/reading/refusals';
import { workbookOf } from '@/lib/services/sheets/workbook';
import type { DataKind, SheetRows } from './messages';

/** More cells than any grower types; what is beyond is no list of old results. */
const MOST_ROWS = 5_000;
const MOST_COLUMNS = 200;

const fits = (rows: readonly (readonly string[])[]) =>
  rows.length <= MOST_ROWS &&
  rows.every((row) => row.length <= MOST_COLUMNS || row.slice(MOST_COLUMNS).every((cell) => cell === ''));

const trimmed = (rows: readonly (readonly string[])[]) => rows.map((row) => row.slice(0, MOST_COLUMNS).map(clean));

/** The cells of a CSV or workbook as text. Called in the process that is killed past its limits. */
export async function rowsOfSheet(input: { kind: DataKind; bytes: Uint8Array }): Promise<SheetRows> {
  if (input.kind === 'csv' || input.kind === 'text') {
    const decoded = decode(input.bytes);
    if (!decoded.ok) return { ok: false, error: refusal('not-a-sheet') };
    const rows = gridOf(decoded.text).grid;
    if (!fits(rows)) return { ok: false, error: refusal('own-sheet-too-large') };
    return { ok: true, sheets: [{ number: 1, name: null, rows: trimmed(rows) }], remarks: [] };
  }
  if (input.kind !== 'xlsx' && input.kind !== 'xls') return { ok: false, error: refusal('not-a-sheet') };
  const book = await workbookOf(input.bytes);
  if (!book.ok) return { ok: false, error: refusal(book.reason) };
  if (!book.sheets.every((sheet) => fits(sheet.grid))) return { ok: false, error: refusal('own-sheet-too-large') };
  const sheets = book.sheets.map(({ number, name, grid }) => ({ number, name, rows: trimmed(grid) }));
  return { ok: true, sheets, remarks: book.remarks };
}
