import type { Ink, Merged } from './types';

type Box = Ink;

/** Gap between two letters of one word, in heights of the letter. */
const WITHIN_WORD = 0.45;
const MOST = 60;

function covered(piece: Ink, words: readonly Merged[]): boolean {
  const [cx, cy] = [(piece.x0 + piece.x1) / 2, (piece.y0 + piece.y1) / 2];
  return words.some((word) => cx > word.x0 - 1 && cx < word.x1 + 1 && cy > word.y0 - 1 && cy < word.y1 + 1);
}

/**
 * Ink of the height of letters that no word lies on, put together to words: what all looks at the whole page passed
 * over, often a large figure close under its caption.
 */
export function leftover(pieces: readonly Ink[], words: readonly Merged[], letter: number): Box[] {
  const free = pieces
    .filter((piece) => {
      const height = piece.y1 - piece.y0;
      return height > 0.55 * letter && height < 2.6 * letter && piece.x1 - piece.x0 < 3 * letter;
    })
    .filter((piece) => !covered(piece, words))
    .sort((a, b) => a.x0 - b.x0);
  const boxes: { x0: number; y0: number; x1: number; y1: number }[] = [];
  for (const piece of free) {
    const height = piece.y1 - piece.y0;
    const home = boxes.find((box) => {
      const shared = Math.min(box.y1, piece.y1) - Math.max(box.y0, piece.y0);
      return shared > 0.6 * Math.min(height, box.y1 - box.y0) && piece.x0 - box.x1 < WITHIN_WORD * height;
    });
    if (home === undefined) boxes.push({ ...piece });
    else {
      home.x1 = Math.max(home.x1, piece.x1);
      home.y0 = Math.min(home.y0, piece.y0);
      home.y1 = Math.max(home.y1, piece.y1);
    }
  }
  return boxes
    .filter((box) => box.x1 - box.x0 > 0.3 * letter)
    .sort((a, b) => a.y0 - b.y0 || a.x0 - b.x0)
    .slice(0, MOST);
}
