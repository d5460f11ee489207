import type { Ink, Merged } from './types';

/** Pieces by bands of the page, so that a word is compared with its own line only. */
export function inkFinder(pieces: readonly Ink[], band: number): (y0: number, y1: number) => readonly Ink[] {
  const bands = new Map<number, Ink[]>();
  for (const piece of pieces) {
    const at = Math.floor((piece.y0 + piece.y1) / 2 / band);
    const list = bands.get(at);
    if (list === undefined) bands.set(at, [piece]);
    else list.push(piece);
  }
  return (y0, y1) => {
    const found: Ink[] = [];
    for (let at = Math.floor(y0 / band); at <= Math.floor(y1 / band); at++) found.push(...(bands.get(at) ?? []));
    return found;
  };
}

const NUMBERLIKE = /^[<>~]?[\d.,]*\d[\d.,]*[A-Z+*]{0,2}$/;
/** Gap between a figure and a letter, in heights of a figure, from which on they are two words. */
const APART = 0.34;

type Parts = { readonly bodies: readonly Ink[]; readonly points: readonly Ink[]; readonly height: number };

function partsOf(word: Merged, near: readonly Ink[]): Parts {
  const height = word.y1 - word.y0;
  const inside = near.filter((piece) => {
    const [cx, cy] = [(piece.x0 + piece.x1) / 2, (piece.y0 + piece.y1) / 2];
    return (
      cx > word.x0 - 0.35 * height && cx < word.x1 + 0.1 * height && cy > word.y0 - 2 && cy < word.y1 + 0.12 * height
    );
  });
  const tall = (piece: Ink) => piece.y1 - piece.y0;
  const bodies = inside.filter((piece) => tall(piece) > 0.5 * height).sort((a, b) => a.x0 - b.x0);
  const bottom = Math.max(...bodies.map((piece) => piece.y1), word.y0);
  const points = inside.filter(
    (piece) =>
      tall(piece) < 0.42 * height &&
      tall(piece) > 0.07 * height &&
      piece.x1 - piece.x0 < 0.36 * height &&
      piece.x1 - piece.x0 > 0.06 * height &&
      piece.y1 > bottom - 0.14 * height &&
      piece.y0 > bottom - 0.36 * height,
  );
  return { bodies, points: points.sort((a, b) => a.x0 - b.x0), height };
}

/** The number with a point put where the ink shows one that the engine lost; null when there is none or no sure place. */
function withPoint(word: Merged, { bodies, points, height }: Parts): string | null {
  const characters = [...word.text];
  if (points.length !== 1 || characters.length !== bodies.length) return null;
  const [point] = points;
  if (point === undefined) return null;
  const middle = (point.x0 + point.x1) / 2;
  const at = bodies.filter((body) => (body.x0 + body.x1) / 2 < middle).length;
  const [before, after] = [bodies[at - 1], bodies[at]];
  if (after === undefined || after.x0 - point.x1 > 0.45 * height) return null;
  // The end of a broken 5 or 2 lies below its own figure; a point has the room of a point between two.
  if (point.x1 > after.x0 - 0.03 * height) return null;
  if (before !== undefined && (point.x0 < before.x1 + 0.02 * height || after.x0 - before.x1 < 0.3 * height))
    return null;
  if (at === 0 && !/^\d/.test(word.text)) return null;
  if (!/\d/.test(characters[at] ?? '')) return null;
  return [...characters.slice(0, at), '.', ...characters.slice(at)].join('');
}

/** "4.111" whose point hangs below the figures has a comma there, between thousands. */
function withComma(text: string, { bodies, points, height }: Parts): string {
  const [mark] = points;
  if (!/^\d{1,3}\.\d{3}$/.test(text) || points.length !== 1 || mark === undefined) return text;
  const bottom = Math.max(...bodies.map((piece) => piece.y1));
  return mark.y1 > bottom + 0.06 * height ? text.replace('.', ',') : text;
}

/** A figure and a letter that stand apart, or a sign before a number, as two words. */
function split(word: Merged, { bodies, height }: Parts): Merged[] {
  const characters = [...word.text].filter((character) => !/[.,]/.test(character));
  if (characters.length !== bodies.length) return [word];
  for (let at = 1; at < characters.length; at++) {
    const [left, right] = [characters[at - 1] ?? '', characters[at] ?? ''];
    const border = (/\d/.test(left) && /[A-Z]/.test(right)) || (/[<>]/.test(left) && /\d/.test(right));
    const [a, b] = [bodies[at - 1], bodies[at]];
    if (!border || a === undefined || b === undefined || b.x0 - a.x1 < APART * height) continue;
    let cut = 0;
    for (let seen = 0; cut < word.text.length; cut++) {
      if (seen === at) break;
      if (!/[.,]/.test(word.text[cut] ?? '')) seen += 1;
    }
    // A point between the two belongs to the number before it only if figures follow; here none do.
    return [
      { ...word, text: word.text.slice(0, cut), x1: a.x1 },
      { ...word, text: word.text.slice(cut), x0: b.x0, point: 'unknown' },
    ];
  }
  return [word];
}

/**
 * Looks at the ink under each number. The engine loses small decimal points and the gap before a rating; both are plain
 * to see in the connected pieces, as long as each character is a piece of its own.
 */
export function checkInk(words: readonly Merged[], pieces: readonly Ink[], letter: number): Merged[] {
  const find = inkFinder(pieces, letter * 2);
  return words.flatMap((word) => {
    if (!NUMBERLIKE.test(word.text)) return [word];
    const parts = partsOf(word, find(word.y0 - letter, word.y1 + letter));
    const clear = parts.bodies.length === [...word.text].filter((character) => !/[.,]/.test(character)).length;
    if (/[.,]/.test(word.text)) {
      const text = withComma(word.text, parts);
      const point = parts.points.length > 0 ? 'seen' : clear ? 'not-seen' : 'unknown';
      return split({ ...word, text, point }, parts);
    }
    const added = word.text.length > 1 || parts.points.length === 1 ? withPoint(word, parts) : null;
    if (added === null)
      return split({ ...word, point: clear && parts.points.length === 0 ? 'seen' : 'unknown' }, parts);
    return split({ ...word, text: added, others: [...new Set([...word.others, word.text])], point: 'added' }, parts);
  });
}
