import { readFile } from 'node:fs/promises';
import { fileURLToPath } from 'node:url';
import { readFile as readReport } from '@/lib/jobs/readFile/readFile';
import { readPages } from '@/lib/reading/readPages';
import { wordsOfPdf } from '@/lib/services/pdf/words';
import { line, median, ms, sideBySide, timesOf, verdict } from './measure';

const TURNS = 25;
const RATIO_GOAL = 1.5;

async function bareText(bytes: Uint8Array): Promise<number> {
  const { getDocument } = await import('pdfjs-dist/legacy/build/pdf.mjs');
  const standardFontDataUrl = `${fileURLToPath(new URL('.', import.meta.resolve('pdfjs-dist/package.json')))}standard_fonts/`;
  const task = getDocument({ data: Uint8Array.from(bytes), standardFontDataUrl, verbosity: 0 });
  const document = await task.promise;
  let items = 0;
  for (let number = 1; number <= document.numPages; number += 1) {
    const page = await document.getPage(number);
    items += (await page.getTextContent()).items.length;
  }
  await task.destroy();
  return items;
}

async function fullReading(bytes: Uint8Array, fileName: string): Promise<number> {
  const words = await wordsOfPdf({ bytes, maxPages: 60 });
  if (!words.ok) throw new Error(`${fileName} was refused: ${words.reason}`);
  const reading = readPages({ fileName, pages: words.pages });
  return reading.samples.reduce((sum, sample) => sum + sample.results.length, 0);
}

/** Reading with everything it does against nothing but the text of the same file, in one process. */
export async function benchReading(files: readonly { name: string; path: string }[]): Promise<void> {
  for (const { name, path } of files) {
    const bytes = new Uint8Array(await readFile(path));
    const rows = await fullReading(bytes, name);
    const { one, other } = await sideBySide(
      TURNS,
      () => fullReading(bytes, name),
      () => bareText(bytes),
    );
    const ratio = median(one) / median(other);
    line(`${name}: ${rows} values read / bare pdf.js text`, `${ms(median(one))} / ${ms(median(other))}`);
    line(`${name}: ratio`, `${ratio.toFixed(2)}  ${verdict(ratio <= RATIO_GOAL)}`, `at most ${RATIO_GOAL}`);
    const whole = await timesOf(3, () => readReport({ bytes, fileName: `${name}.pdf` }), 1);
    line(`${name}: in its own killable process, start to answer`, ms(median(whole)));
  }
}
