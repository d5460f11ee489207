import type { PageFractions } from './types';

export type QuarterTurn = 0 | 90 | 180 | 270;

/** /Rotate of a page as one of four turns; anything else counts as unturned. */
export function quarterTurn(degrees: number): QuarterTurn {
  const turned = ((degrees % 360) + 360) % 360;
  return turned === 90 || turned === 180 || turned === 270 ? turned : 0;
}

/**
 * A box stored as fractions of the unturned, cropped page becomes fractions of the page as it is shown, turned clockwise.
 * The crop box needs no step of its own: the fractions are already of the cropped page, and so is the picture.
 */
export function boxAsShown(box: PageFractions, turn: QuarterTurn): PageFractions {
  const [x0, y0, x1, y1] = ordered(box);
  if (turn === 90) return [1 - y1, x0, 1 - y0, x1];
  if (turn === 180) return [1 - x1, 1 - y1, 1 - x0, 1 - y0];
  if (turn === 270) return [y0, 1 - x1, y1, 1 - x0];
  return [x0, y0, x1, y1];
}

/** The box with a little air round it, so that the outline does not touch the number; still inside the page. */
export function withAir(box: PageFractions, air: { readonly x: number; readonly y: number }): PageFractions {
  const [x0, y0, x1, y1] = box;
  return [Math.max(0, x0 - air.x), Math.max(0, y0 - air.y), Math.min(1, x1 + air.x), Math.min(1, y1 + air.y)];
}

function ordered([x0, y0, x1, y1]: PageFractions): PageFractions {
  return [Math.min(x0, x1), Math.min(y0, y1), Math.max(x0, x1), Math.max(y0, y1)];
}
