import { jsonTree } from '@/lib/reading/labData/json';
import { readLabData } from '@/lib/reading/labData/readLabData';
import { readPasted } from '@/lib/reading/pasted/readPasted';
import { hasHidden } from '@/lib/reading/plain';
import { readTable } from '@/lib/reading/readTable';
import { decode } from '@/lib/reading/table/decode';
import { type Reading, refusedReading } from '@/lib/reading/types';
import { type RefusalCode, refusal } from '@/lib/services/reading/refusals';
import { workbookOf } from '@/lib/services/sheets/workbook';
import { xmlTree } from '@/lib/services/sheets/xmlTree';
import type { DataKind } from './messages';

type DataReading = { readonly reading: Reading; readonly hidden: boolean };

/**
 * Reads a file that has no pages: a data file, a sheet, a text. `hidden`: it holds characters that do not show. Called in
 * the process that is killed past its limits.
 */
export async function readDataFile(input: {
  kind: DataKind;
  fileName: string;
  bytes: Uint8Array;
}): Promise<DataReading> {
  const { kind, fileName, bytes } = input;
  const refuse = (code: RefusalCode) => ({
    reading: refusedReading({ file: fileName, pages: 0, error: refusal(code) }),
    hidden: false,
  });
  if (kind === 'xlsx' || kind === 'xls') {
    const book = await workbookOf(bytes);
    if (!book.ok) return refuse(book.reason);
    const { sheets, shownDates, remarks } = book;
    const hidden = sheets.some((sheet) => sheet.grid.some((row) => row.some(hasHidden)));
    return { reading: readTable({ fileName, sheets, shownDates, warnings: remarks }), hidden };
  }
  const decoded = decode(bytes);
  if (!decoded.ok) return refuse('not-what-it-says');
  const { text } = decoded;
  const hidden = hasHidden(text);
  if (kind === 'csv') return { reading: readTable({ fileName, text }), hidden };
  if (kind === 'text') return { reading: readPasted({ fileName, text }), hidden };
  const tree = kind === 'xml' ? xmlTree(text) : jsonTree(text);
  return tree.ok ? { reading: readLabData({ fileName, root: tree.root }), hidden } : refuse(tree.reason);
}
