import { median } from './pieces';
import type { Piece } from './types';

/** Most letters looked at; more say no more. */
const ENOUGH = 3000;
const WIDEST_SKEW = 15;

function some<T>(all: readonly T[], count: number): T[] {
  if (all.length <= count) return [...all];
  const step = all.length / count;
  return Array.from({ length: count }, (_, index) => all[Math.floor(index * step)]).filter((one) => one !== undefined);
}

/** Letters by squares of the page, so that a neighbour is looked for close by only. */
function squares(letters: readonly Piece[], side: number): (x: number, y: number) => readonly Piece[] {
  const map = new Map<string, Piece[]>();
  for (const piece of letters) {
    const key = `${Math.floor((piece.x0 + piece.x1) / 2 / side)},${Math.floor((piece.y0 + piece.y1) / 2 / side)}`;
    const list = map.get(key);
    if (list === undefined) map.set(key, [piece]);
    else list.push(piece);
  }
  return (x, y) => map.get(`${x},${y}`) ?? [];
}

/**
 * True when the lines of text run up and down. Letters of a word stand closer to each other than lines do, so each
 * letter's nearest neighbour tells which way its line runs.
 */
export function runsUpright(letters: readonly Piece[]): boolean {
  const size = median(letters.map((piece) => Math.max(piece.x1 - piece.x0, piece.y1 - piece.y0))) || 1;
  const side = size * 2;
  const near = squares(letters, side);
  let [level, upright] = [0, 0];
  for (const piece of some(letters, ENOUGH)) {
    const [cx, cy] = [(piece.x0 + piece.x1) / 2, (piece.y0 + piece.y1) / 2];
    const [sx, sy] = [Math.floor(cx / side), Math.floor(cy / side)];
    let [best, way] = [side, 0];
    for (let dx = -1; dx <= 1; dx++) {
      for (let dy = -1; dy <= 1; dy++) {
        for (const other of near(sx + dx, sy + dy)) {
          if (other === piece) continue;
          const gapX = Math.max(0, piece.x0 - other.x1, other.x0 - piece.x1);
          const gapY = Math.max(0, piece.y0 - other.y1, other.y0 - piece.y1);
          // Pieces one over the other with hardly a gap are one letter: i, %, a broken figure.
          if (gapX === 0 && gapY === 0) continue;
          const gap = Math.hypot(gapX, gapY);
          if (gap < best) [best, way] = [gap, gapX >= gapY ? 1 : -1];
        }
      }
    }
    if (way > 0) level += 1;
    else if (way < 0) upright += 1;
  }
  return upright > level * 1.2;
}

/** How sharply the feet of the letters fall into lines after a shear; the sum of squared counts by row. */
function sharpness(feet: readonly { x: number; y: number }[], slope: number, step: number): number {
  const rows = new Map<number, number>();
  for (const foot of feet) {
    const at = (foot.y - slope * foot.x) / step;
    const low = Math.floor(at);
    rows.set(low, (rows.get(low) ?? 0) + 1 - (at - low));
    rows.set(low + 1, (rows.get(low + 1) ?? 0) + at - low);
  }
  let sum = 0;
  for (const count of rows.values()) sum += count * count;
  return sum;
}

/** Angle of the lines of text in radians, positive when they fall to the right; 0 when there is too little to tell. */
export function skewOf(letters: readonly Piece[]): number {
  if (letters.length < 20) return 0;
  const size = median(letters.map((piece) => piece.y1 - piece.y0)) || 1;
  const feet = some(letters, ENOUGH).map((piece) => ({ x: (piece.x0 + piece.x1) / 2, y: piece.y1 }));
  const radians = (degrees: number) => (degrees * Math.PI) / 180;
  let [best, found] = [-1, 0];
  const search = (from: number, to: number, by: number, step: number) => {
    [best] = [-1];
    for (let degrees = from; degrees <= to + 1e-9; degrees += by) {
      const value = sharpness(feet, Math.tan(radians(degrees)), step);
      if (value > best) [best, found] = [value, degrees];
    }
  };
  search(-WIDEST_SKEW, WIDEST_SKEW, 0.5, Math.max(2, size / 4));
  const rough = found;
  search(rough - 0.6, rough + 0.6, 0.1, Math.max(1.5, size / 6));
  const finer = found;
  search(finer - 0.1, finer + 0.1, 0.02, Math.max(1, size / 8));
  return radians(found);
}
