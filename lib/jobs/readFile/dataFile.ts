import { jsonTree } from '@/lib/reading/labData/json';
import { readLabData } from '@/lib/reading/labData/readLabData';
import { readPasted } from '@/lib/reading/pasted/readPasted';
import { readTable } from '@/lib/reading/readTable';
import { decode } from '@/lib/reading/table/decode';
import { type Reading, refusedReading } from '@/lib/reading/types';
import { type RefusalCode, refusal } from '@/lib/services/reading/refusals';
import { workbookOf } from '@/lib/services/sheets/workbook';
import { xmlTree } from '@/lib/services/sheets/xmlTree';
import type { DataKind } from './messages';

/** Reads a file that has no pages: a data file, a sheet, a text. Called in the process that is killed past its limits. */
export async function readDataFile(input: { kind: DataKind; fileName: string; bytes: Uint8Array }): Promise<Reading> {
  const { fileName, bytes } = input;
  const refuse = (code: RefusalCode) => refusedReading({ file: fileName, pages: 0, error: refusal(code) });
  switch (input.kind) {
    case 'csv':
      return readTable({ fileName, bytes });
    case 'text':
      return readPasted({ fileName, bytes });
    case 'xlsx':
    case 'xls': {
      const book = await workbookOf(bytes);
      if (!book.ok) return refuse(book.reason);
      return readTable({ fileName, sheets: book.sheets, shownDates: book.shownDates, warnings: book.remarks });
    }
    case 'xml':
    case 'json': {
      const decoded = decode(bytes);
      if (!decoded.ok) return refuse('not-what-it-says');
      const tree = input.kind === 'xml' ? xmlTree(decoded.text) : jsonTree(decoded.text);
      return tree.ok ? readLabData({ fileName, root: tree.root }) : refuse(tree.reason);
    }
  }
}
