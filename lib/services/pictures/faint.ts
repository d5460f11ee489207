import { inkOf } from './light';
import { piecesOf } from './pieces';
import type { Grey } from './types';

/** Grey type stands out from its paper at least this much. */
const LIGHTEST = 218;
/** A piece of type without any point this dark is grey. */
const GREY = 105;
/** What is nowhere darker than this is grain or a shade. */
const GRAIN = 196;
/** The darkest point of a grey letter becomes this. */
const DARK = 40;
const MOST = 4;

/**
 * The picture with grey type as dark as the black type beside it: units and notes that a form prints small and pale.
 * Only pieces of ink of the size of letters and points are touched, so fills and shades stay.
 */
export function withDarkType(picture: Grey, letter: number): Grey {
  const data = new Uint8Array(picture.data);
  let changed = false;
  for (const { x0, y0, x1, y1, area } of piecesOf(inkOf(picture, LIGHTEST))) {
    if (x1 - x0 > 5 * letter || y1 - y0 > 3 * letter || area < 0.01 * letter * letter) continue;
    let darkest = 255;
    for (let y = y0; y < y1; y++)
      for (let x = x0; x < x1; x++) darkest = Math.min(darkest, picture.data[y * picture.width + x] ?? 255);
    if (darkest < GREY || darkest > GRAIN) continue;
    const by = Math.min(MOST, (255 - DARK) / (255 - darkest));
    changed = true;
    for (let y = Math.max(0, y0 - 1); y < Math.min(picture.height, y1 + 1); y++)
      for (let x = Math.max(0, x0 - 1); x < Math.min(picture.width, x1 + 1); x++) {
        const at = y * picture.width + x;
        data[at] = Math.min(data[at] ?? 255, Math.max(0, Math.round(255 - by * (255 - (picture.data[at] ?? 255)))));
      }
  }
  return changed ? { ...picture, data } : picture;
}
