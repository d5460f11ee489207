import { maskJson } from '@/lib/reading/mask/maskJson';
import { shownWords } from '@/lib/reading/mask/maskWords';
import { readPagesTraced } from '@/lib/reading/readPages';
import type { Page, Reading } from '@/lib/reading/types';
import { picturesOfPdf } from '@/lib/services/pdf/pictures';
import { wordsOfPdf } from '@/lib/services/pdf/words';
import { decodePicture } from '@/lib/services/pictures/decode';
import { maskPicture, pictureAsPng } from '@/lib/services/pictures/maskPicture';
import type { Grey } from '@/lib/services/pictures/types';
import { refusal } from '@/lib/services/reading/refusals';
import { sniffReport } from '@/lib/services/reading/sniff';
import { MAX_PAGES, NO_WORDS } from '../readFile/limits';
import type { Masked, NotMasked, ToMaskChild } from './messages';
import type { PageToMask } from './pageToMask';
import { scannedPage } from './scan';

const NO_WORDS_SEEN =
  'No words could be told apart on this page, so nothing on it can be shown without showing names too. No copy was made.';
const OTHER_KIND =
  'A copy without names can be made of pages of a PDF and of pictures. For other files, describe the fault in words. No copy was made.';

const no = (sentence: string): NotMasked => ({ ok: false, sentence });

async function pictureOf(bytes: Uint8Array, number: number): Promise<Grey> {
  const drawn: Grey[] = [];
  const onPicture = async (_: number, picture: Grey) => {
    drawn.push(picture);
  };
  await picturesOfPdf({ bytes, numbers: [number], perhaps: [], onPicture });
  const [picture] = drawn;
  if (!picture) throw new Error('The page was not drawn.');
  return picture;
}

async function pageOfPdf({ fileName, bytes, page: number }: ToMaskChild): Promise<PageToMask | NotMasked> {
  const words = await wordsOfPdf({ bytes, maxPages: MAX_PAGES });
  if (!words.ok) return no(refusal(words.reason).sentence);
  const page = words.pages.find((one) => one.number === number);
  if (!page) return no(NO_WORDS_SEEN);
  const picture = await pictureOf(bytes, number);
  if (page.words.length < NO_WORDS) return (await scannedPage(fileName, number, picture)) ?? no(NO_WORDS_SEEN);
  const { reading, trace } = readPagesTraced({ fileName, pages: words.pages });
  return { picture, places: page.words, page, pages: words.pages, reading, trace, turn: page.rotation };
}

async function pageOfPicture({ fileName, bytes }: ToMaskChild): Promise<PageToMask | NotMasked> {
  const decoded = await decodePicture(bytes);
  if (!decoded.ok) return no(refusal(decoded.reason).sentence);
  return (await scannedPage(fileName, 1, decoded.picture)) ?? no(NO_WORDS_SEEN);
}

/** Words that are hidden wherever they stand; one that is shown somewhere (a value, a rating) tells nothing by itself. */
function hiddenWords(pages: readonly Page[], reading: Reading): string[] {
  const [visible, hidden]: [Set<string>, Set<string>] = [new Set(), new Set()];
  for (const page of pages) {
    const shown = shownWords(page, reading);
    for (const [at, word] of page.words.entries()) (shown[at] ? visible : hidden).add(word.text);
  }
  return [...hidden].filter((word) => !visible.has(word));
}

/** One page with everything hidden that could say whose it is, and what the reader's stages saw with the same words hidden. */
export async function maskPage(asked: ToMaskChild): Promise<Masked | NotMasked> {
  const sniffed = sniffReport(asked);
  if (!sniffed.ok) return no(OTHER_KIND);
  const isPicture = sniffed.kind === 'png' || sniffed.kind === 'jpeg';
  if (sniffed.kind !== 'pdf' && !isPicture) return no(OTHER_KIND);
  const found = await (isPicture ? pageOfPicture(asked) : pageOfPdf(asked));
  if ('ok' in found) return found;
  const { picture, places, page, pages, reading, trace, turn } = found;
  const shown = shownWords(page, reading);
  const png = await pictureAsPng(maskPicture(picture, places, shown), turn);
  const hidden = hiddenWords(pages, reading);
  const pageText = pages.flatMap((one) => one.words.map((word) => word.text)).join(' ');
  const { file: _, ...rest } = reading;
  const stages = maskJson({ reading: rest, trace }, hidden, pageText, trace?.pages ?? []);
  const kept = shown.filter(Boolean).length;
  return { ok: true, picture: png, stages: JSON.stringify(stages), kept, masked: shown.length - kept };
}
