import { piecesOf } from './pieces';
import type { Grey, Ink, Piece } from './types';

/** A break in a line this long is still the same line. */
const GAP = 3;

type Way = {
  readonly lines: number;
  readonly along: number;
  readonly stepLine: number;
  readonly stepAlong: number;
  readonly length: number;
};

function ways(ink: Ink, type: number): { across: Way; down: Way } {
  const { width, height } = ink;
  return {
    across: { lines: height, along: width, stepLine: width, stepAlong: 1, length: Math.round(type * 4.5) },
    down: { lines: width, along: height, stepLine: 1, stepAlong: width, length: Math.round(type * 3) },
  };
}

/** Long runs of ink in one direction, each as its line and its two ends. */
function* runsOf({ data }: Ink, way: Way): Generator<{ line: number; from: number; to: number }> {
  for (let line = 0; line < way.lines; line++) {
    let [start, last] = [-1, -1];
    for (let at = 0; at <= way.along; at++) {
      const on = at < way.along && data[line * way.stepLine + at * way.stepAlong] === 1;
      if (on) {
        if (start < 0) start = at;
        last = at;
        continue;
      }
      if (start < 0 || (at < way.along && at - last <= GAP)) continue;
      if (last - start + 1 >= way.length) yield { line, from: start, to: last };
      start = -1;
    }
  }
}

function marked(ink: Ink, way: Way): Uint8Array {
  const mask = new Uint8Array(ink.data.length);
  for (const { line, from, to } of runsOf(ink, way))
    for (let at = from; at <= to; at++) mask[line * way.stepLine + at * way.stepAlong] = 1;
  return mask;
}

/**
 * Strokes of one direction made white where they are thin, or where they cross a stroke of the other direction; where a
 * letter crosses a stroke, the letter's points stay.
 */
function wipe(grey: Uint8Array, ink: Ink, way: Way, other: Uint8Array, thick: number): void {
  const { data } = ink;
  for (const { line, from, to } of runsOf(ink, way)) {
    for (let k = from; k <= to; k++) {
      const place = (l: number) => l * way.stepLine + k * way.stepAlong;
      let [low, high] = [line, line];
      while (low > 0 && line - low <= thick && data[place(low - 1)] === 1) low -= 1;
      while (high < way.lines - 1 && high - line <= thick && data[place(high + 1)] === 1) high += 1;
      if (high - low + 1 > thick) {
        if (other[place(line)] === 1) grey[place(line)] = 255;
        continue;
      }
      // Two points more on each side: the soft edge of the stroke.
      for (let l = Math.max(0, low - 2); l <= Math.min(way.lines - 1, high + 2); l++)
        if ((l >= low && l <= high) || data[place(l)] === 0) grey[place(l)] = 255;
    }
  }
}

/** Specks that stand alone: corners of wiped tables, dust. A decimal point has figures beside it and stays. */
function withoutSpecks(grey: Uint8Array, pieces: readonly Piece[], width: number, type: number): void {
  const small = (piece: Piece) => piece.x1 - piece.x0 < 0.4 * type && piece.y1 - piece.y0 < 0.4 * type;
  const rows = new Map<number, Piece[]>();
  for (const piece of pieces) {
    if (small(piece) || piece.y1 - piece.y0 > 4 * type) continue;
    for (let row = Math.floor(piece.y0 / type); row <= Math.floor(piece.y1 / type); row++) {
      const list = rows.get(row);
      if (list === undefined) rows.set(row, [piece]);
      else list.push(piece);
    }
  }
  const reach = 0.9 * type;
  for (const piece of pieces) {
    if (!small(piece)) continue;
    const near = [-1, 0, 1].some((step) =>
      rows
        .get(Math.floor((piece.y0 + piece.y1) / 2 / type) + step)
        ?.some(
          (letter) =>
            letter.x0 - piece.x1 < reach &&
            piece.x0 - letter.x1 < reach &&
            letter.y0 - piece.y1 < 0.5 * type &&
            piece.y0 - letter.y1 < 0.3 * type,
        ),
    );
    if (near) continue;
    for (let y = piece.y0; y < piece.y1; y++) grey.fill(255, y * width + piece.x0, y * width + piece.x1);
  }
}

/** So many small strokes or points close together on one line are a drawn line, not writing. */
const DRAWN = 10;

/** Rows of dashes and leading dots made white: they say nothing and are read as words. */
function withoutDashes(grey: Uint8Array, pieces: readonly Piece[], width: number, type: number): void {
  const flat = pieces
    .filter((piece) => piece.y1 - piece.y0 < 0.3 * type && piece.x1 - piece.x0 < 1.6 * type)
    .sort((a, b) => a.y1 - b.y1 || a.x0 - b.x0);
  const rows: Piece[][] = [];
  for (const piece of flat) {
    const row = rows[rows.length - 1];
    const first = row?.[0];
    if (row !== undefined && first !== undefined && piece.y1 - first.y1 <= 0.15 * type) row.push(piece);
    else rows.push([piece]);
  }
  for (const row of rows) {
    let run: Piece[] = [];
    const close = () => {
      if (run.length >= DRAWN)
        for (const piece of run)
          for (let y = piece.y0 - 1; y <= piece.y1; y++)
            grey.fill(255, y * width + piece.x0 - 1, y * width + piece.x1 + 1);
      run = [];
    };
    for (const piece of row.sort((a, b) => a.x0 - b.x0)) {
      const last = run[run.length - 1];
      if (last !== undefined && piece.x0 - last.x1 > 0.9 * type) close();
      run.push(piece);
    }
    close();
  }
}

/** The picture without ruling lines and lone specks. `type` is the usual height of its letters, in points. */
export function withoutRules(picture: Grey, faint: Ink, type: number): Grey {
  const data = Uint8Array.from(picture.data);
  const thick = Math.max(3, Math.round(type * 0.3));
  const { across, down } = ways(faint, type);
  const [acrossMask, downMask] = [marked(faint, across), marked(faint, down)];
  wipe(data, faint, across, downMask, thick);
  wipe(data, faint, down, acrossMask, thick);
  const left: Ink = { ...faint, data: new Uint8Array(data.length) };
  for (let at = 0; at < data.length; at++) left.data[at] = (data[at] ?? 255) < SPECK_INK ? 1 : 0;
  const pieces = piecesOf(left);
  withoutDashes(data, pieces, picture.width, type);
  withoutSpecks(data, pieces, picture.width, type);
  return { ...picture, data };
}

/** Darker than this is looked at as a speck or a letter. */
const SPECK_INK = 200;
