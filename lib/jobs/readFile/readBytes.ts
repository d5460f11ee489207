import { hasHidden, plainReading } from '@/lib/reading/plain';
import { type Reading, refusedReading } from '@/lib/reading/types';
import { wordsOfPdf } from '@/lib/services/pdf/words';
import { refusal } from '@/lib/services/reading/refusals';
import { readDataFile } from './dataFile';
import { MAX_PAGES } from './limits';
import { isDataKind, type ToChild } from './messages';
import { readPdfPages, readPictureFile, type Told } from './pictures';

/** The reading of one file's bytes, whatever they are. Called in the process that is killed past its limits. */
export async function readBytes(input: ToChild, tell: Told): Promise<Reading> {
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
