import { type Reading, refusedReading } from '@/lib/reading/types';
import { wordsOfPdf } from '@/lib/services/pdf/words';
import { refusal } from '@/lib/services/reading/refusals';
import { readDataFile } from './dataFile';
import { MAX_PAGES } from './limits';
import { type FromChild, isDataKind, type ToChild } from './messages';
import { readPdfPages, readPictureFile, type Told } from './pictures';
import { rowsOfSheet } from './sheetRows';

/** Child process that reads one file and ends. It has no environment, no database and no store. */
function send(message: FromChild) {
  process.send?.(message);
}

const tell: Told = {
  page: (page, of) => send({ type: 'page', page, of }),
  scans: (pages) => send({ type: 'scans', pages }),
};

async function read(input: ToChild): Promise<Reading> {
  if (isDataKind(input.kind)) return readDataFile({ ...input, kind: input.kind });
  if (input.kind === 'picture') return (await readPictureFile(input, tell)).reading;
  const words = await wordsOfPdf({
    bytes: input.bytes,
    maxPages: MAX_PAGES,
    onPage: tell.page,
  });
  if (!words.ok) return refusedReading({ file: input.fileName, pages: words.pages, error: refusal(words.reason) });
  return readPdfPages({ ...input, pages: words.pages }, tell);
}

async function answer(input: ToChild): Promise<FromChild> {
  if (input.rowsOnly && isDataKind(input.kind)) {
    return { type: 'rows', rows: await rowsOfSheet({ kind: input.kind, bytes: input.bytes }) };
  }
  return { type: 'done', reading: await read(input) };
}

process.on('disconnect', () => process.exit(1));
process.once('message', (message: ToChild) => {
  answer(message).then(
    (said) => process.send?.(said, () => process.exit(0)),
    () => process.exit(1),
  );
});
send({ type: 'ready' });
