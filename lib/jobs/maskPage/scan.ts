import { readScanTraced } from '@/lib/reading/scan/readScan';
import type { Page } from '@/lib/reading/types';
import { openEngine } from '@/lib/services/ocr/engine';
import { readPicture, type SeenPage } from '@/lib/services/ocr/page';
import type { Grey } from '@/lib/services/pictures/types';
import type { PageToMask } from './pageToMask';

/** Longer side of a sheet in points of paper, when nothing says how large it is: a letter's. */
const USUAL_SIDE = 792;

/** How the picture is turned to stand upright: where the level page's right side lies on it. */
function turnOf(seen: SeenPage): 0 | 90 | 180 | 270 {
  const middle = { y0: seen.height * 0.49, y1: seen.height * 0.51 };
  const [ax = 0, ay = 0] = seen.stored({ ...middle, x0: seen.width * 0.1, x1: seen.width * 0.11 });
  const [bx = 0, by = 0] = seen.stored({ ...middle, x0: seen.width * 0.9, x1: seen.width * 0.91 });
  if (Math.abs(bx - ax) >= Math.abs(by - ay)) return bx >= ax ? 0 : 180;
  return by >= ay ? 270 : 90;
}

/** A page that is a picture: its words as they were seen on it. Null when none could be made out. */
export async function scannedPage(fileName: string, number: number, picture: Grey): Promise<PageToMask | null> {
  const engine = await openEngine();
  try {
    const seen = await readPicture(engine, picture);
    if (seen === null) return null;
    const { width, height, letter, views, pieces, stored } = seen;
    const scale = seen.side / USUAL_SIDE;
    const { trace, level } = await readScanTraced({
      fileName,
      pages: [{ number, width, height, letter, views, pieces, stored, scale }],
      lookAgain: (_, spots, as) => seen.look(spots, as),
    });
    const upright = trace?.pages.find((one) => one.number === number);
    if (!trace || !upright) return null;
    const words = upright.words.map((word) => ({
      ...word,
      x0: word.x0 / upright.width,
      x1: word.x1 / upright.width,
      y0: word.y0 / upright.height,
      y1: word.y1 / upright.height,
      direction: 0 as const,
    }));
    const page: Page = { number, width: upright.width, height: upright.height, rotation: 0, words };
    const places = words.map((word) => {
      const box = { x0: word.x0 * width, x1: word.x1 * width, y0: word.y0 * height, y1: word.y1 * height };
      const [x0, y0, x1, y1] = stored(box);
      return { x0, y0, x1, y1 };
    });
    return { picture, places, page, pages: [page], reading: level, trace, turn: turnOf(seen) };
  } finally {
    await engine.close();
  }
}
