import type { Ink, Piece } from './types';

const MOST_PIECES = 200_000;

/** Connected pieces of ink (8 neighbours), found run by run. */
export function piecesOf(ink: Ink): Piece[] {
  const { width, height, data } = ink;
  const parent: number[] = [];
  const boxes: { x0: number; y0: number; x1: number; y1: number; area: number }[] = [];
  const root = (index: number): number => {
    let at = index;
    while (parent[at] !== at) {
      parent[at] = parent[parent[at] ?? at] ?? at;
      at = parent[at] ?? at;
    }
    return at;
  };
  type Run = { from: number; to: number; id: number };
  let above: Run[] = [];
  for (let y = 0; y < height; y++) {
    const runs: Run[] = [];
    let first = 0;
    for (let x = 0; x < width; x++) {
      if (data[y * width + x] === 0) continue;
      const from = x;
      while (x < width && data[y * width + x] === 1) x += 1;
      const to = x;
      while (first < above.length && (above[first]?.to ?? 0) < from) first += 1;
      let id = -1;
      for (let k = first; k < above.length; k++) {
        const other = above[k];
        if (other === undefined || other.from > to) break;
        const found = root(other.id);
        if (id < 0) id = found;
        else if (id !== found) parent[found] = id;
      }
      if (id < 0) {
        id = parent.length;
        if (id >= MOST_PIECES) return [];
        parent.push(id);
        boxes.push({ x0: from, y0: y, x1: to, y1: y + 1, area: 0 });
      }
      const box = boxes[id];
      if (box !== undefined) {
        box.x0 = Math.min(box.x0, from);
        box.x1 = Math.max(box.x1, to);
        box.y1 = y + 1;
        box.area += to - from;
      }
      runs.push({ from, to, id });
    }
    above = runs;
  }
  const whole = new Map<number, { x0: number; y0: number; x1: number; y1: number; area: number }>();
  for (const [index, box] of boxes.entries()) {
    const top = root(index);
    const seen = whole.get(top);
    if (seen === undefined) whole.set(top, { ...box });
    else {
      seen.x0 = Math.min(seen.x0, box.x0);
      seen.y0 = Math.min(seen.y0, box.y0);
      seen.x1 = Math.max(seen.x1, box.x1);
      seen.y1 = Math.max(seen.y1, box.y1);
      seen.area += box.area;
    }
  }
  return [...whole.values()];
}

export function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[Math.floor(sorted.length / 2)] ?? 0;
}

/** Pieces that look like letters and figures: neither specks nor lines nor fills, and about as high as most. */
export function lettersOf(pieces: readonly Piece[], smallest = 4): Piece[] {
  const likely = pieces.filter((piece) => {
    const [w, h] = [piece.x1 - piece.x0, piece.y1 - piece.y0];
    return Math.max(w, h) >= smallest && Math.max(w, h) <= 90 && w < 8 * h && h < 8 * w;
  });
  const usual = median(likely.map((piece) => Math.max(piece.x1 - piece.x0, piece.y1 - piece.y0)));
  return likely.filter((piece) => {
    const long = Math.max(piece.x1 - piece.x0, piece.y1 - piece.y0);
    return long > 0.45 * usual && long < 2.6 * usual;
  });
}
