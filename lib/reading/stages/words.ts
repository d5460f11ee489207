import { clean } from '../labels/normal';
import type { Box, Page, Word } from '../types';

/** A word turned upright, in points from the top left of the page as a person reads it. */
export type Placed = {
  readonly text: string;
  readonly x0: number;
  readonly y0: number;
  readonly x1: number;
  readonly y1: number;
  readonly size: number;
};

export type Upright = {
  readonly number: number;
  readonly width: number;
  readonly height: number;
  /** Quarter turn that was undone, so that a box can be given on the page as stored. */
  readonly turn: 0 | 90 | 180 | 270;
  readonly words: readonly Placed[];
  /** Words that run another way than the page: captions up the side, watermarks. */
  readonly sideways: readonly Word[];
};

/** A gap narrower than this share of the type size is inside a word, not between two. */
const INSIDE_WORD = 0.07;

function mainDirection(words: readonly Word[]): 0 | 90 | 180 | 270 {
  const counts = new Map<0 | 90 | 180 | 270, number>();
  for (const word of words) counts.set(word.direction, (counts.get(word.direction) ?? 0) + word.text.length);
  let best: 0 | 90 | 180 | 270 = 0;
  for (const [direction, count] of counts) if (count > (counts.get(best) ?? 0)) best = direction;
  return best;
}

function turnWord(word: Word, page: Page, turn: 0 | 90 | 180 | 270): Placed {
  const [w, h] = [page.width, page.height];
  const [x0, y0, x1, y1] = [word.x0 * w, word.y0 * h, word.x1 * w, word.y1 * h];
  const rest = { text: clean(word.text), size: word.size };
  if (turn === 90) return { ...rest, x0: y0, y0: w - x1, x1: y1, y1: w - x0 };
  if (turn === 180) return { ...rest, x0: w - x1, y0: h - y1, x1: w - x0, y1: h - y0 };
  if (turn === 270) return { ...rest, x0: h - y1, y0: x0, x1: h - y0, y1: x1 };
  return { ...rest, x0, y0, x1, y1 };
}

/** Rows of dots between a label and its number are no text; a word that holds such a row is two words. */
function withoutLeaders(word: Placed): Placed[] {
  // Rules drawn with characters part the page for the eye only.
  if (/^[.…_]+$|^[|¦]+$|^[-=~*+|]{5,}$/.test(word.text)) return [];
  const match = /^(.*?)([._·…]{4,})(.*)$/s.exec(word.text);
  if (match === null) return [word];
  const [head, dots, tail] = [match[1] ?? '', match[2] ?? '', match[3] ?? ''];
  const step = (word.x1 - word.x0) / word.text.length;
  const from = word.x0 + (head.length + dots.length) * step;
  return [
    ...(head === '' ? [] : [{ ...word, text: head, x1: word.x0 + head.length * step }]),
    ...(tail === '' ? [] : withoutLeaders({ ...word, text: tail, x0: from })),
  ];
}

/** A box in upright points, given back as fractions of the page as stored. */
export function storedBox(page: Upright, box: { x0: number; y0: number; x1: number; y1: number }): Box {
  const sideways = page.turn === 90 || page.turn === 270;
  const [w, h] = sideways ? [page.height, page.width] : [page.width, page.height];
  const corners: Box =
    page.turn === 90
      ? [w - box.y1, box.x0, w - box.y0, box.x1]
      : page.turn === 180
        ? [w - box.x1, h - box.y1, w - box.x0, h - box.y0]
        : page.turn === 270
          ? [box.y0, h - box.x1, box.y1, h - box.x0]
          : [box.x0, box.y0, box.x1, box.y1];
  const share = (value: number, whole: number) => Math.round(Math.min(1, Math.max(0, value / whole)) * 1e5) / 1e5;
  return [share(corners[0], w), share(corners[1], h), share(corners[2], w), share(corners[3], h)];
}

/** Words by their baseline in steps of two points, so that a neighbour is looked for on its own line only. */
function byBaseline(words: readonly Placed[]): ReadonlyMap<number, Placed[]> {
  const lines = new Map<number, Placed[]>();
  for (const word of words) {
    const step = Math.round(word.y1 / 2);
    const line = lines.get(step);
    if (line === undefined) lines.set(step, [word]);
    else line.push(word);
  }
  return lines;
}

function continues(whole: Placed, other: Placed): boolean {
  return (
    other.x0 >= whole.x0 &&
    Math.abs(other.x0 - whole.x1) < INSIDE_WORD * whole.size &&
    Math.abs(other.y1 - whole.y1) < 0.12 * whole.size &&
    Math.abs(other.size - whole.size) < 0.05 * whole.size
  );
}

function nextPiece(
  whole: Placed,
  first: Placed,
  lines: ReadonlyMap<number, readonly Placed[]>,
  used: ReadonlySet<Placed>,
): Placed | undefined {
  const step = Math.round(whole.y1 / 2);
  // No counting loop: a step beyond the whole numbers never ends one.
  for (const at of [step - 1, step, step + 1]) {
    const next = lines.get(at)?.find((other) => other !== first && continues(whole, other) && !used.has(other));
    if (next !== undefined) return next;
  }
  return undefined;
}

const UNIT_END = /(^|[ /])(k|d|c|m|µ)?(m|g)$|(^|[ /])(ft|yd|ha|acre|dm|cm)$/i;

/**
 * Raised and lowered small type. A lowered figure belongs to its word ("P" + "2"), so does the raised power of a unit;
 * any other raised mark points to a footnote or a charge and is dropped.
 */
function withScripts(words: readonly Placed[]): Placed[] {
  const largest = words.reduce((most, word) => Math.max(most, word.size), 0);
  const small = words.filter((word) => word.size < 0.82 * largest && /^[\d+*†‡§a-e-]{1,3}$/.test(word.text));
  if (small.length === 0) return [...words];
  // Only a larger word that ends where the script begins can be its base.
  const ends = new Map<number, Placed[]>();
  for (const word of words) {
    const step = Math.round(word.x1 / 4);
    const list = ends.get(step);
    if (list === undefined) ends.set(step, [word]);
    else list.push(word);
  }
  const before = (x: number) => [-2, -1, 0, 1, 2].flatMap((step) => ends.get(Math.round(x / 4) + step) ?? []);
  const gone = new Set<Placed>();
  const grown = new Map<Placed, Placed>();
  for (const script of [...small].sort((a, b) => a.x0 - b.x0)) {
    const base = before(script.x0).find((word) => {
      const now = grown.get(word) ?? word;
      return (
        word !== script &&
        !gone.has(word) &&
        script.size < 0.82 * word.size &&
        Math.abs(script.x0 - now.x1) < 0.3 * word.size &&
        script.y0 < word.y1 + 0.3 * word.size &&
        script.y1 > word.y0 - 0.5 * word.size
      );
    });
    if (base === undefined) continue;
    const now = grown.get(base) ?? base;
    const lowered = (script.y0 + script.y1) / 2 > (base.y0 + base.y1) / 2;
    if (lowered || (/^[-+]?[123]$/.test(script.text) && UNIT_END.test(now.text))) {
      const whole = { ...now, text: now.text + script.text, x1: Math.max(now.x1, script.x1) };
      grown.set(base, whole);
      ends.get(Math.round(whole.x1 / 4))?.push(base) ?? ends.set(Math.round(whole.x1 / 4), [base]);
    }
    gone.add(script);
  }
  return words.flatMap((word) => (gone.has(word) ? [] : [grown.get(word) ?? word]));
}

function joinPieces(words: readonly Placed[]): Placed[] {
  const sorted = [...words].sort((a, b) => a.y0 - b.y0 || a.x0 - b.x0);
  const lines = byBaseline(sorted);
  const used = new Set<Placed>();
  const joined: { first: Placed; whole: Placed }[] = [];
  for (const first of sorted) {
    if (used.has(first)) continue;
    let whole = first;
    for (;;) {
      const next = nextPiece(whole, first, lines, used);
      if (next === undefined) break;
      used.add(next);
      whole = { ...whole, text: whole.text + next.text, x1: next.x1, y0: Math.min(whole.y0, next.y0) };
    }
    joined.push({ first, whole });
  }
  return joined.filter(({ first }) => !used.has(first)).map(({ whole }) => whole);
}

/**
 * Stage 1. Turns the page so that its text runs to the right, sets words that run another way aside, joins the pieces
 * into which a PDF writer cut a word, and drops the same word printed twice in one place (false bold).
 */
export function uprightWords(page: Page): Upright {
  const turn = mainDirection(page.words);
  const swap = turn === 90 || turn === 270;
  const straight = page.words.filter((word) => word.direction === turn);
  const placed = straight
    .map((word) => turnWord(word, page, turn))
    .flatMap(withoutLeaders)
    .filter((word) => word.text !== '');
  const seen = new Set<string>();
  const once = placed.filter((word) => {
    const key = `${word.text}@${Math.round(word.x0)},${Math.round(word.y0)}`;
    if (seen.has(key)) return false;
    seen.add(key);
    return true;
  });
  return {
    number: page.number,
    width: swap ? page.height : page.width,
    height: swap ? page.width : page.height,
    turn,
    words: joinPieces(withScripts(once)),
    sideways: page.words.filter((word) => word.direction !== turn),
  };
}
