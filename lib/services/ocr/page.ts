import { part, upsideDown, warp } from '../pictures/grey';
import { inkOf } from '../pictures/light';
import { carry } from '../pictures/matrix';
import { piecesOf } from '../pictures/pieces';
import { mapUpsideDown, type Prepared, prepare } from '../pictures/prepare';
import type { Grey, Piece } from '../pictures/types';
import type { Engine, SeenWord } from './engine';

export type Spot = { readonly x0: number; readonly y0: number; readonly x1: number; readonly y1: number };

/** A page read from its picture; all boxes in points of the level picture. */
export type SeenPage = {
  readonly width: number;
  readonly height: number;
  /** Usual height of a letter, in points of the picture. */
  readonly letter: number;
  /** Longer side of the whole sheet, in points of the picture; the picture holds only the part with type. */
  readonly side: number;
  /** The words as each way of looking saw them. */
  readonly views: readonly (readonly SeenWord[])[];
  /** Connected pieces of ink of the size of letters, figures and points. */
  readonly pieces: readonly Piece[];
  /** A box of the level picture as fractions of the page as stored. */
  readonly stored: (box: Spot) => readonly [number, number, number, number];
  /** What stands at each spot when it is cut out, enlarged and read alone, as any word or as a number; '' for nothing. */
  readonly look: (spots: readonly Spot[], as: 'number' | 'word') => Promise<readonly string[]>;
};

/** A spot is looked at again this much larger; type much larger or smaller than usual is brought to one height. */
const CLOSE_UP = 1.3;
const NUMBERS = '0123456789.,<>-';

/** How well a picture reads: certain words with letters or figures in them. */
function sense(words: readonly SeenWord[]): number {
  return words
    .filter((word) => /[A-Za-z]{3,}|\d[\d.]+/.test(word.text))
    .reduce((sum, word) => sum + (word.certainty > 0.6 ? word.certainty * word.text.length : 0), 0);
}

/** The band of the page with most ink, some eight lines high. */
function busiest(picture: Grey, letter: number): Spot {
  const high = Math.min(picture.height, Math.round(letter * 16));
  const rows = new Float64Array(picture.height + 1);
  for (let y = 0; y < picture.height; y++) {
    let ink = 0;
    for (let x = 0; x < picture.width; x += 3) if ((picture.data[y * picture.width + x] ?? 255) < 128) ink += 1;
    rows[y + 1] = (rows[y] ?? 0) + Math.min(ink, picture.width / 12);
  }
  let [best, top] = [-1, 0];
  for (let y = 0; y + high <= picture.height; y += Math.max(4, Math.round(letter / 2))) {
    const ink = (rows[y + high] ?? 0) - (rows[y] ?? 0);
    if (ink > best) [best, top] = [ink, y];
  }
  return { x0: 0, y0: top, x1: picture.width, y1: top + high };
}

/** True when the page makes more sense turned upside down. */
async function standsOnHead(engine: Engine, { picture, letter }: Prepared): Promise<boolean> {
  const band = part(picture, busiest(picture, letter));
  const upright = await engine.read(band, 'block');
  const whole = upright.filter((word) => word.text.length > 1);
  const mean = whole.reduce((sum, word) => sum + word.certainty, 0) / (whole.length || 1);
  if (whole.length >= 10 && mean > 0.82) return false;
  return sense(await engine.read(upsideDown(band), 'block')) > sense(upright) * 1.15;
}

type Placed = { readonly top: number; readonly bottom: number };

/** The spots under each other on a clean sheet, one a line, with wide margins. */
function columnOf(picture: Grey, letter: number, spots: readonly Spot[]): { sheet: Grey; lines: Placed[] } {
  const margin = Math.round(letter * CLOSE_UP);
  const cuts = spots.map((spot) => {
    const [width, height] = [spot.x1 - spot.x0, spot.y1 - spot.y0];
    const usual = 1.2 * letter;
    const zoom = height > 1.5 * usual ? (CLOSE_UP * usual) / height : CLOSE_UP;
    return warp(
      picture,
      [1 / zoom, 0, spot.x0, 0, 1 / zoom, spot.y0, 0, 0, 1],
      Math.max(1, Math.round(width * zoom)),
      Math.max(1, Math.round(height * zoom)),
    );
  });
  const width = Math.max(...cuts.map((cut) => cut.width)) + 2 * margin;
  const height = cuts.reduce((sum, cut) => sum + cut.height + margin, margin);
  const data = new Uint8Array(width * height).fill(255);
  const lines: Placed[] = [];
  let top = margin;
  for (const cut of cuts) {
    for (let y = 0; y < cut.height; y++)
      data.set(cut.data.subarray(y * cut.width, (y + 1) * cut.width), (top + y) * width + margin);
    lines.push({ top, bottom: top + cut.height });
    top += cut.height + margin;
  }
  return { sheet: { width, height, data }, lines };
}

/** The spot drawn close around the ink that belongs to it, so that no neighbour's line is in the cut. */
function tight(spot: Spot, pieces: readonly Piece[], letter: number): Spot {
  const mine = pieces.filter((piece) => {
    const w = Math.min(piece.x1, spot.x1) - Math.max(piece.x0, spot.x0);
    const h = Math.min(piece.y1, spot.y1) - Math.max(piece.y0, spot.y0);
    return w > 0 && h > 0 && w * h > 0.6 * (piece.x1 - piece.x0) * (piece.y1 - piece.y0);
  });
  if (mine.length === 0) return spot;
  const room = Math.max(2, 0.1 * letter);
  return {
    x0: Math.min(...mine.map((piece) => piece.x0)) - room,
    y0: Math.min(...mine.map((piece) => piece.y0)) - room,
    x1: Math.max(...mine.map((piece) => piece.x1)) + room,
    y1: Math.max(...mine.map((piece) => piece.y1)) + room,
  };
}

async function lookAgain(
  engine: Engine,
  picture: Grey,
  letter: number,
  spots: readonly Spot[],
  only: string,
): Promise<readonly string[]> {
  if (spots.length === 0) return [];
  const { sheet, lines } = columnOf(picture, letter, spots);
  const words = await engine.read(sheet, 'block', only);
  return lines.map(({ top, bottom }) =>
    words
      .filter((word) => (word.y0 + word.y1) / 2 > top && (word.y0 + word.y1) / 2 < bottom)
      .sort((a, b) => a.x0 - b.x0)
      .map((word) => word.text)
      .join(''),
  );
}

/** Darker than this is ink of a point or a hair stroke; the paper is white by now. */
const FAINT_INK = 175;

function smallPieces(picture: Grey, letter: number): Piece[] {
  return piecesOf(inkOf(picture, FAINT_INK)).filter((piece) => {
    const [w, h] = [piece.x1 - piece.x0, piece.y1 - piece.y0];
    return w < 4 * letter && h < 3 * letter && piece.area > 0.008 * letter * letter;
  });
}

/** Reads a picture of a page in two ways. Null when there is no type on it that could be read. */
export async function readPicture(engine: Engine, source: Grey): Promise<SeenPage | null> {
  const prepared = prepare(source, true);
  if (prepared === null) return null;
  const head = await standsOnHead(engine, prepared);
  const picture = head ? upsideDown(prepared.picture) : prepared.picture;
  const toStored = head ? mapUpsideDown(prepared.toStored, prepared.picture) : prepared.toStored;
  const pieces = smallPieces(picture, prepared.letter);
  const views = [await engine.read(picture, 'sparse'), await engine.read(picture, 'block')];
  return {
    width: picture.width,
    height: picture.height,
    letter: prepared.letter,
    side: prepared.side * prepared.scale,
    views,
    pieces,
    stored: ({ x0, y0, x1, y1 }) => {
      const corners = [
        carry(toStored, x0, y0),
        carry(toStored, x1, y0),
        carry(toStored, x1, y1),
        carry(toStored, x0, y1),
      ];
      const xs = corners.map((point) => Math.min(1, Math.max(0, point.x)));
      const ys = corners.map((point) => Math.min(1, Math.max(0, point.y)));
      return [Math.min(...xs), Math.min(...ys), Math.max(...xs), Math.max(...ys)];
    },
    look: (spots, as) => {
      const close = spots.map((spot) => tight(spot, pieces, prepared.letter));
      return lookAgain(engine, picture, prepared.letter, close, as === 'number' ? NUMBERS : '');
    },
  };
}
