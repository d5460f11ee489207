import { readPasted } from '@/lib/reading/pasted/readPasted';
import { readTable } from '@/lib/reading/readTable';
import { type Reading, refusedReading } from '@/lib/reading/types';
import { refusal } from '@/lib/services/reading/refusals';
import { workbookOf } from '@/lib/services/sheets/workbook';
import type { DataKind } from './messages';

/** Reads a file that has no pages: a data file, a sheet, a text. Called in the process that is killed past its limits. */
export async function readDataFile(input: { kind: DataKind; fileName: string; bytes: Uint8Array }): Promise<Reading> {
  const { fileName, bytes } = input;
  switch (input.kind) {
    case 'csv':
      return readTable({ fileName, bytes });
    case 'text':
      return readPasted({ fileName, bytes });
    case 'xlsx':
    case 'xls': {
      const book = await workbookOf(bytes);
      if (!book.ok) return refusedReading({ file: fileName, pages: 0, error: refusal(book.reason) });
      return readTable({ fileName, sheets: book.sheets, shownDates: book.shownDates, warnings: book.remarks });
    }
  }
}
