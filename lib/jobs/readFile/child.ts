import { hasHidden, plainReading } from '@/lib/reading/plain';
import { type Reading, refusedReading } from '@/lib/reading/types';
import { wordsOfPdf } from '@/lib/services/pdf/words';
import { refusal } from '@/lib/services/reading/refusals';
import { confine } from './confine';
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
  if (isDataKind(input.kind)) {
    const { reading, hidden } = await readDataFile({ ...input, kind: input.kind });
    return plainReading(reading, hidden);
  }
  if (input.kind === 'picture') return plainReading((await readPictureFile(input, tell)).reading, false);
  const words = await wordsOfPdf({
    bytes: input.bytes,
    maxPages: MAX_PAGES,
    onPage: tell.page,
  });
  if (!words.ok) return refusedReading({ file: input.fileName, pages: words.pages, error: refusal(words.reason) });
  const hidden = words.pages.some((page) => page.words.some((word) => hasHidden(word.text)));
  return plainReading(await readPdfPages({ ...input, pages: words.pages }, tell), hidden);
}

async function answer(input: ToChild): Promise<FromChild> {
  if (input.rowsOnly && isDataKind(input.kind)) {
    return { type: 'rows', rows: await rowsOfSheet({ kind: input.kind, bytes: input.bytes }) };
  }
  return { type: 'done', reading: await read(input) };
}

confine();
process.on('disconnect', () => process.exit(1));
process.once('message', (message: ToChild) => {
  answer(message).then(
    (said) => process.send?.(said, () => process.exit(0)),
    () => process.exit(1),
  );
});
send({ type: 'ready' });
