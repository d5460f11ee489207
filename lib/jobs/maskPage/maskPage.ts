import { maskJson } from '@/lib/reading/mask/maskJson';
import { shownWords } from '@/lib/reading/mask/maskWords';
import { readPagesTraced } from '@/lib/reading/readPages';
import { picturesOfPdf } from '@/lib/services/pdf/pictures';
import { wordsOfPdf } from '@/lib/services/pdf/words';
import { maskPicture, pictureAsPng } from '@/lib/services/pictures/maskPicture';
import type { Grey } from '@/lib/services/pictures/types';
import { refusal } from '@/lib/services/reading/refusals';
import { sniffReport } from '@/lib/services/reading/sniff';
import { MAX_PAGES } from '../readFile/limits';
import type { Masked, NotMasked, ToMaskChild } from './messages';

const NO_TEXT =
  'This page is a picture without words that could be told apart, so nothing on it can be shown without showing names too. No copy was made.';
const OTHER_KIND =
  'A copy without names can be made of pages of a PDF. For other files, describe the fault in words. No copy was made.';

/** One page with everything hidden that could say whose it is, and what the reader's stages saw with the same words hidden. */
export async function maskPage({ fileName, bytes, page: number }: ToMaskChild): Promise<Masked | NotMasked> {
  const sniffed = sniffReport({ bytes, fileName });
  if (!sniffed.ok || sniffed.kind !== 'pdf') return { ok: false, sentence: OTHER_KIND };
  const words = await wordsOfPdf({ bytes, maxPages: MAX_PAGES });
  if (!words.ok) return { ok: false, sentence: refusal(words.reason).sentence };
  const page = words.pages.find((one) => one.number === number);
  if (!page || page.words.length < 3) return { ok: false, sentence: NO_TEXT };
  const { reading, trace } = readPagesTraced({ fileName, pages: words.pages });
  // A name may stand on another page than the one that is handed on.
  const hidden = words.pages.flatMap((one) => {
    const shown = shownWords(one, reading);
    return one.words.filter((_, at) => shown[at] !== true).map((word) => word.text);
  });
  const shown = shownWords(page, reading);
  const drawn = await pictureOf(bytes, number);
  const picture = await pictureAsPng(maskPicture(drawn, page.words, shown), page.rotation);
  const pageText = words.pages.flatMap((one) => one.words.map((word) => word.text)).join(' ');
  const { file: _, ...rest } = reading;
  const stages = maskJson({ reading: rest, trace }, hidden, pageText, trace?.pages ?? []);
  const kept = shown.filter(Boolean).length;
  return { ok: true, picture, stages: JSON.stringify(stages), kept, masked: shown.length - kept };
}

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
