import { shrink, warp } from './grey';
import { flatten, HAIRLINE, inkOf } from './light';
import { carry, chain, inverse, type Matrix, rectangleToQuad, SAME, scaling, shifting, turning } from './matrix';
import { findPage, flatSize } from './page';
import { lettersOf, median, piecesOf } from './pieces';
import { withoutRules } from './rules';
import { runsUpright, skewOf } from './straight';
import type { Grey, Piece } from './types';

/** Height in points that the usual letter is brought to: what 10-point type has at 300 points an inch. */
const LETTER = 32;
/** The picture looked at for turn and skew. */
const LOOK = 1700;
const MOST_POINTS = 12_000_000;
const LARGEST_SCALE = 4;

export type Prepared = {
  /** Level, evenly lit, with type of a good size, without ruling lines. */
  readonly picture: Grey;
  /** Takes a point of `picture` to fractions of the page as stored. */
  readonly toStored: Matrix;
  /** Usual height of its letters, in points. */
  readonly letter: number;
  /** Points of `picture` to one point of the sheet as it came, before it was enlarged. */
  readonly scale: number;
  /** Longer side of the sheet, in points as it came. */
  readonly side: number;
};

function letters(picture: Grey) {
  const flat = flatten(picture, 24);
  return lettersOf(piecesOf(inkOf(flat)));
}

/** The part of the page that holds type, with room around it. Letters are in units of `by` points. */
function inkBox(letters: readonly Piece[], map: Matrix, by: number, room: number) {
  let [x0, y0, x1, y1] = [Number.POSITIVE_INFINITY, Number.POSITIVE_INFINITY, -1e9, -1e9];
  for (const piece of letters) {
    const at = carry(map, ((piece.x0 + piece.x1) / 2) * by, ((piece.y0 + piece.y1) / 2) * by);
    [x0, y0, x1, y1] = [Math.min(x0, at.x), Math.min(y0, at.y), Math.max(x1, at.x), Math.max(y1, at.y)];
  }
  return { x0: x0 - room, y0: y0 - room, x1: x1 + room, y1: y1 + room };
}

/**
 * A scan or photograph made ready for reading: the sheet found and laid flat, turned so that its lines run level (which
 * way up is left to the reading), shadows lifted, type brought to one size, ruling lines taken out. All geometry is one
 * projective map, so every point can be told on the page as stored.
 */
export function prepare(source: Grey, photo: boolean): Prepared | null {
  const quad = photo ? findPage(source) : null;
  const size = quad === null ? { width: source.width, height: source.height } : flatSize(quad);
  const flatToSource = quad === null ? SAME : rectangleToQuad(size.width, size.height, quad);
  const reduce = Math.max(size.width, size.height) / LOOK;
  const look = (map: Matrix, width: number, height: number, by: number) => {
    const whole = Math.max(1, Math.floor(by));
    const from = shrink(source, whole);
    return warp(
      from,
      chain(scaling(1 / whole, 1 / whole), map, scaling(by, by)),
      Math.max(1, Math.round(width / by)),
      Math.max(1, Math.round(height / by)),
    );
  };
  const by = Math.max(1, reduce);
  const seen = letters(look(flatToSource, size.width, size.height, by));
  if (seen.length < 12) return null;
  const upright = runsUpright(seen);
  // A quarter turn: x of the level page runs along y of the sheet.
  const [width, height] = upright ? [size.height, size.width] : [size.width, size.height];
  const levelToFlat: Matrix = upright ? [0, 1, 0, -1, 0, size.height, 0, 0, 1] : SAME;
  const level = upright
    ? seen.map((piece) => ({
        ...piece,
        x0: size.height / by - piece.y1,
        x1: size.height / by - piece.y0,
        y0: piece.x0,
        y1: piece.x1,
      }))
    : seen;
  const angle = skewOf(level);
  const type = median(level.map((piece) => piece.y1 - piece.y0)) * by || LETTER;
  // Level, about the middle of the sheet; only the part with type on it is kept.
  const levelled = chain(shifting(width / 2, height / 2), turning(angle));
  const box = inkBox(level, inverse(levelled), by, 2.5 * type);
  const [wide, high] = [box.x1 - box.x0, box.y1 - box.y0];
  const scale = Math.min(LARGEST_SCALE, LETTER / type, Math.sqrt(MOST_POINTS / (wide * high)));
  const toLevel = chain(levelled, shifting(box.x0, box.y0), scaling(1 / scale, 1 / scale));
  const toSource = chain(flatToSource, levelToFlat, toLevel);
  const whole = Math.max(1, Math.floor(1 / scale));
  const raw = warp(
    shrink(source, whole),
    chain(scaling(1 / whole, 1 / whole), toSource),
    Math.round(wide * scale),
    Math.round(high * scale),
  );
  const ruled = flatten(raw, Math.round(LETTER * 1.6));
  const picture = withoutRules(ruled, inkOf(ruled, HAIRLINE), type * scale);
  return {
    picture,
    toStored: chain(scaling(1 / source.width, 1 / source.height), toSource),
    letter: type * scale,
    scale,
    side: Math.max(width, height),
  };
}

/** The same map for the picture turned upside down. */
export function mapUpsideDown(toStored: Matrix, picture: Grey): Matrix {
  return chain(toStored, [-1, 0, picture.width, 0, -1, picture.height, 0, 0, 1]);
}
