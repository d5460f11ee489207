import { readPages } from '@/lib/reading/readPages';
import { type Reading, refusedReading } from '@/lib/reading/types';
import { wordsOfPdf } from '@/lib/services/pdf/words';
import { refusal } from '@/lib/services/reading/refusals';
import { readDataFile } from './dataFile';
import { MAX_PAGES } from './limits';
import { type FromChild, isDataKind, type ToChild } from './messages';

/** Child process that reads one file and ends. It has no environment, no database and no store. */
function send(message: FromChild) {
  process.send?.(message);
}

async function read(input: ToChild): Promise<Reading> {
  if (isDataKind(input.kind)) return readDataFile({ ...input, kind: input.kind });
  const words = await wordsOfPdf({
    bytes: input.bytes,
    maxPages: MAX_PAGES,
    onPage: (page, of) => send({ type: 'page', page, of }),
  });
  if (!words.ok) return refusedReading({ file: input.fileName, pages: words.pages, error: refusal(words.reason) });
  return readPages({ fileName: input.fileName, pages: words.pages });
}

process.on('disconnect', () => process.exit(1));
process.once('message', (message: ToChild) => {
  read(message).then(
    (reading) => process.send?.({ type: 'done', reading } satisfies FromChild, () => process.exit(0)),
    () => process.exit(1),
  );
});
send({ type: 'ready' });
