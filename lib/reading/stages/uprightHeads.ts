import type { Word } from '../types';
import type { Placed, Upright } from './words';

type Strip = { text: string; x0: number; x1: number; y0: number; y1: number; size: number; turn: 90 | 270 };

function onPage(word: Word, page: Upright): Strip | null {
  const relative = (word.direction - page.turn + 360) % 360;
  if (relative !== 90 && relative !== 270) return null;
  const swap = page.turn === 90 || page.turn === 270;
  const [w, h] = swap ? [page.height, page.width] : [page.width, page.height];
  const [a, b, c, d] = [word.x0 * w, word.y0 * h, word.x1 * w, word.y1 * h];
  const box =
    page.turn === 90
      ? { x0: b, y0: w - c, x1: d, y1: w - a }
      : page.turn === 180
        ? { x0: w - c, y0: h - d, x1: w - a, y1: h - b }
        : page.turn === 270
          ? { x0: h - d, y0: a, x1: h - b, y1: c }
          : { x0: a, y0: b, x1: c, y1: d };
  return { text: word.text, ...box, size: word.size, turn: relative };
}

function middle(strip: Strip): number {
  return (strip.x0 + strip.x1) / 2;
}

/** Words of one upright line put together in the order in which they are read. */
function joinWords(strips: readonly Strip[]): Strip[] {
  const joined: Strip[] = [];
  const ordered = [...strips].sort((a, b) => middle(a) - middle(b) || (a.turn === 270 ? b.y1 - a.y1 : a.y0 - b.y0));
  for (const strip of ordered) {
    const home = joined.find(
      (other) =>
        other.turn === strip.turn &&
        Math.abs(middle(other) - middle(strip)) < 0.3 * strip.size &&
        Math.min(Math.abs(other.y0 - strip.y1), Math.abs(strip.y0 - other.y1)) < 0.9 * strip.size,
    );
    if (home === undefined) joined.push({ ...strip });
    else {
      home.text = `${home.text} ${strip.text}`;
      home.y0 = Math.min(home.y0, strip.y0);
      home.y1 = Math.max(home.y1, strip.y1);
      home.x0 = Math.min(home.x0, strip.x0);
      home.x1 = Math.max(home.x1, strip.x1);
    }
  }
  return joined;
}

/** Two or three upright lines side by side that are one heading: closer than one heading to the next. */
function joinLines(strips: readonly Strip[]): Strip[] {
  const ordered = [...strips].sort((a, b) => middle(a) - middle(b));
  const steps = ordered.slice(1).map((strip, index) => middle(strip) - middle(ordered[index] ?? strip));
  const heads: Strip[] = [];
  for (const [index, strip] of ordered.entries()) {
    const last = heads[heads.length - 1];
    const step = steps[index - 1] ?? Number.POSITIVE_INFINITY;
    const level = last !== undefined && Math.min(last.y1, strip.y1) > Math.max(last.y0, strip.y0);
    if (last !== undefined && level && step < 1.35 * strip.size && Math.max(...steps) > 1.6 * step) {
      last.text = strip.turn === 270 ? `${last.text} ${strip.text}` : `${strip.text} ${last.text}`;
      last.x1 = Math.max(last.x1, strip.x1);
      last.y0 = Math.min(last.y0, strip.y0);
      last.y1 = Math.max(last.y1, strip.y1);
    } else heads.push({ ...strip });
  }
  return heads;
}

/**
 * Stage 1b. Headings that run up the page over their columns, given as words that stand level at their lower end, so
 * that the later stages see a line of headings. Upright words that stand one under another (captions of groups up the
 * side, a note in the margin) are left aside.
 */
export function uprightHeads(page: Upright): Placed[] {
  const strips = page.sideways.flatMap((word) => onPage(word, page) ?? []);
  const heads = joinLines(joinWords(strips));
  const found: Placed[] = [];
  const left = new Set(heads);
  for (const head of heads) {
    if (!left.has(head)) continue;
    const level = [...left].filter(
      (other) =>
        Math.min(head.y1, other.y1) - Math.max(head.y0, other.y0) >
        0.3 * Math.min(head.y1 - head.y0, other.y1 - other.y0),
    );
    if (level.length < 3) continue;
    const y1 = Math.max(...level.map((one) => one.y1));
    for (const one of level) {
      left.delete(one);
      found.push({ text: one.text, x0: one.x0, x1: one.x1, y0: y1 - one.size, y1, size: one.size });
    }
  }
  return found;
}
