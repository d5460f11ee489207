import sharp from 'sharp';
import type { Grey } from './types';

/** A word's place on the picture, as fractions of it. */
type Place = { readonly x0: number; readonly y0: number; readonly x1: number; readonly y1: number };
type Spot = { x0: number; y0: number; x1: number; y1: number };

const WIDEST = 1700;
const DARK = 140;
const WHITE = 255;
/** A stroke this long and this thin is a line of a table. */
const LINE_SHARE = 1 / 25;
const THIN_SHARE = 1 / 350;
const PAD_SHOWN = 0.12;
const PAD_HIDDEN = 0.22;

function spotOf(place: Place, { width, height }: Grey, pad: number): Spot {
  // On a page that lies on its side a word is higher than wide; the smaller side is the height of its type.
  const tall = Math.min((place.y1 - place.y0) * height, (place.x1 - place.x0) * width);
  const [px, py] = [tall * pad, tall * pad * 1.4];
  return {
    x0: Math.max(0, Math.floor(place.x0 * width - px)),
    y0: Math.max(0, Math.floor(place.y0 * height - py)),
    x1: Math.min(width, Math.ceil(place.x1 * width + px)),
    y1: Math.min(height, Math.ceil(place.y1 * height + py)),
  };
}

/** Thin straight strokes along one axis: the rules of tables and forms. Letters and pictures are not both long and thin. */
function copyRules({ width, height, data }: Grey, out: Uint8Array, across: boolean): void {
  const [along, over] = across ? [width, height] : [height, width];
  const step = across ? 1 : width;
  const row = across ? width : 1;
  const thin = Math.max(4, Math.round(width * THIN_SHARE));
  const dark = (a: number, o: number) => o >= 0 && o < over && (data[o * row + a * step] ?? WHITE) < DARK;
  for (let o = 0; o < over; o += 1) {
    let from = -1;
    for (let a = 0; a <= along; a += 1) {
      if (a < along && dark(a, o)) {
        if (from < 0) from = a;
        continue;
      }
      if (from >= 0 && a - from >= along * LINE_SHARE) {
        let thick = 0;
        for (let p = from; p < a; p += 1) if (dark(p, o - thin) || dark(p, o + thin)) thick += 1;
        if (thick < (a - from) * 0.15) for (let p = from; p < a; p += 1) out[o * row + p * step] = 0;
      }
      from = -1;
    }
  }
}

/**
 * A page as a picture in which only the words that may be shown, and the rules of its tables, are what stood there. It
 * begins white and takes over nothing else, so that a letterhead, a signature or a photograph cannot slip through; hidden
 * words become black bars, drawn last. `shown` goes word by word with `words`;
 */
export function maskPicture(picture: Grey, words: readonly Place[], shown: readonly boolean[]): Grey {
  const { width, height, data } = picture;
  const out = new Uint8Array(width * height).fill(WHITE);
  copyRules(picture, out, true);
  copyRules(picture, out, false);
  words.forEach((word, at) => {
    if (shown[at] !== true) return;
    const spot = spotOf(word, picture, PAD_SHOWN);
    for (let y = spot.y0; y < spot.y1; y += 1)
      out.set(data.subarray(y * width + spot.x0, y * width + spot.x1), y * width + spot.x0);
  });
  words.forEach((word, at) => {
    if (shown[at] === true) return;
    const spot = spotOf(word, picture, PAD_HIDDEN);
    for (let y = spot.y0; y < spot.y1; y += 1) out.fill(0, y * width + spot.x0, y * width + spot.x1);
  });
  return { width, height, data: out };
}

/** PNG without a word beside the picture, turned as the page is shown. */
export async function pictureAsPng({ width, height, data }: Grey, turn: 0 | 90 | 180 | 270): Promise<Uint8Array> {
  sharp.cache(false);
  sharp.concurrency(1);
  const png = await sharp(data, { raw: { width, height, channels: 1 } })
    .rotate(turn)
    .resize({ width: WIDEST, withoutEnlargement: true })
    .png()
    .toBuffer();
  return new Uint8Array(png);
}
