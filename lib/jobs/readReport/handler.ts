import { saveSheetRows } from '@/lib/data/ownSheets/saveSheetRows';
import { giveUpReading, STORE_DOWN } from '@/lib/data/reports/giveUpReading';
import { noteProgress } from '@/lib/data/reports/noteProgress';
import { releaseReading } from '@/lib/data/reports/releaseReading';
import { saveReading } from '@/lib/data/reports/saveReading';
import { startReading } from '@/lib/data/reports/startReading';
import { Problem } from '@/lib/errors';
import { log } from '@/lib/log';
import type { Reading } from '@/lib/reading/types';
import { cellsKey, getFile, putFile } from '@/lib/services/storage/storage';
import type { JobTools } from '../job';
import type { SheetRows } from '../readFile/messages';
import { readSheetRows } from '../readFile/readFile';

export type ReadFile = (input: {
  bytes: Uint8Array;
  fileName: string;
  signal?: AbortSignal | undefined;
  onPage?: ((page: number, of: number) => void) | undefined;
}) => Promise<Reading>;

export type ReadSheet = (input: {
  bytes: Uint8Array;
  fileName: string;
  signal?: AbortSignal | undefined;
}) => Promise<SheetRows>;

/** What the grower is told if no later try goes better. */
function whatWentWrong(error: unknown): { code: string; sentence: string } {
  if (error instanceof Problem && error.reason === 'file-store') {
    return {
      code: STORE_DOWN,
      sentence: 'The file store is not answering, so this file waits. It is read once the store is back.',
    };
  }
  if (error instanceof Problem && error.reason === 'file-changed') {
    return { code: error.reason, sentence: `${error.sentence} Send the file again, or let it be read again later.` };
  }
  if (error instanceof Problem && error.code === 'not-found') {
    return {
      code: 'file-missing',
      sentence: 'The file is no longer in the store. Send it again, or type the numbers in.',
    };
  }
  return {
    code: 'reader-failed',
    sentence:
      'This file was tried several times and could not be read. It is kept; type its numbers in beside the page, or let it be read again later.',
  };
}

const WORKBOOK = /\.xlsx?$/i;

/** A workbook's cells are kept beside it, so that the review can show them without anybody opening the workbook again. */
async function keepCells(input: {
  task: { fileKey: string; fileName: string };
  bytes: Uint8Array;
  signal: AbortSignal | undefined;
  readSheet: ReadSheet;
}): Promise<void> {
  const { task, bytes, signal, readSheet } = input;
  const cells = await readSheet({ bytes, fileName: task.fileName, signal });
  if (!cells.ok) return;
  const text = JSON.stringify({ sheets: cells.sheets });
  await putFile(cellsKey(task.fileKey), new TextEncoder().encode(text), 'application/json');
}

/** received -> reading -> in-review, unreadable or not-soil. A second delivery finds the lease taken and does nothing. */
export const readReportWith =
  (readFile: ReadFile, readSheet: ReadSheet = readSheetRows) =>
  async ({ ctx, payload, signal }: JobTools<'read-report'>): Promise<void> => {
    const task = await startReading({ ctx, input: payload });
    if (!task) return;
    const { lease } = task;
    let noted: Promise<void> = Promise.resolve();
    try {
      const bytes = await getFile(task.fileKey, task.sha256);
      if (task.ownSheet) {
        const rows = await readSheet({ bytes, fileName: task.fileName, signal });
        await saveSheetRows({ ctx, input: { lease, rows } });
        return;
      }
      const reading = await readFile({
        bytes,
        fileName: task.fileName,
        signal,
        onPage: (page, pages) => {
          noted = noted
            .then(() => noteProgress({ ctx, input: { lease, page, pages } }))
            .catch((err: unknown) => log().warn({ err, reportId: lease.id }, 'progress was not written'));
        },
      });
      await noted;
      if (WORKBOOK.test(task.fileName)) await keepCells({ task, bytes, signal, readSheet });
      const saved = await saveReading({ ctx, input: { lease, reading } });
      if (!saved) log().warn({ reportId: lease.id }, 'another worker took this report over; this reading is dropped');
    } catch (error) {
      await noted;
      await releaseReading({ ctx, input: { lease, ...whatWentWrong(error) } });
      throw error;
    }
  };

export const giveUpReport = ({ ctx, payload }: JobTools<'read-report'>): Promise<void> =>
  giveUpReading({ ctx, input: payload });
