import { inkOf } from './light';
import { piecesOf } from './pieces';
import type { Grey } from './types';

/** Area of a speck at most, in squares of the letter's height; a decimal point covers more than twice as much. */
const SPECK = 0.011;
/** The fringe of a speck is as light as this. */
const FRINGE = 205;
/** A clean page has fewer dots that small; only a noisy one is swept. */
const MANY = 200;

/** Share of points between black and white up to which a picture is taken for one of two tones. */
const BETWEEN = 0.01;

/** True for a fax or copy without greys: only there are small dots as dark as the type, and never faint decimal points. */
export function isTwoToned(source: Grey): boolean {
  let between = 0;
  for (const value of source.data) if (value > 40 && value < 215) between += 1;
  return between <= BETWEEN * source.data.length;
}

/** The picture without the single dots that a fax or a poor copy strews over the page. */
export function withoutSpecks(picture: Grey, letter: number): Grey {
  const specks = piecesOf(inkOf(picture, FRINGE)).filter((piece) => piece.area <= SPECK * letter * letter);
  if (specks.length < MANY) return picture;
  const data = new Uint8Array(picture.data);
  for (const { x0, y0, x1, y1 } of specks) {
    for (let y = Math.max(0, y0 - 1); y < Math.min(picture.height, y1 + 1); y++) {
      for (let x = Math.max(0, x0 - 1); x < Math.min(picture.width, x1 + 1); x++) {
        const at = y * picture.width + x;
        // The fringe next to a letter belongs to the letter.
        if ((x >= x0 && x < x1 && y >= y0 && y < y1) || (data[at] ?? 0) > FRINGE) data[at] = 255;
      }
    }
  }
  return { ...picture, data };
}
