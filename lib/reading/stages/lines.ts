import { type Edge, partAt } from './edges';
import { uprightHeads } from './uprightHeads';
import type { Placed, Upright } from './words';

/** Words that stand close together on one line and are read as one: a label, a name, a number with its unit. */
export type Phrase = {
  readonly page: Upright;
  readonly line: number;
  readonly text: string;
  readonly words: readonly Placed[];
  readonly x0: number;
  readonly y0: number;
  readonly x1: number;
  readonly y1: number;
  readonly size: number;
};

export type Line = {
  readonly page: Upright;
  readonly index: number;
  readonly phrases: readonly Phrase[];
  readonly text: string;
  readonly y0: number;
  readonly y1: number;
  readonly size: number;
};

/** A gap wider than this share of the type size parts two phrases; a blank is about 0.28, in typewriter type 0.6. */
const BETWEEN_PHRASES = 0.66;
/** Words whose middles differ by less than this share of the smaller type stand on one line. */
const SAME_LINE = 0.38;

/** The smallest box around some words, and their largest type. */
function around(words: readonly Placed[]) {
  const box = { x0: Infinity, y0: Infinity, x1: -Infinity, y1: -Infinity, size: -Infinity };
  for (const word of words) {
    if (word.x0 < box.x0) box.x0 = word.x0;
    if (word.y0 < box.y0) box.y0 = word.y0;
    if (word.x1 > box.x1) box.x1 = word.x1;
    if (word.y1 > box.y1) box.y1 = word.y1;
    if (word.size > box.size) box.size = word.size;
  }
  return box;
}

/** A phrase of words that stand on one line, with the box around them. */
export function phraseOf(page: Upright, line: number, words: readonly Placed[]): Phrase {
  return { page, line, words, text: words.map((word) => word.text).join(' '), ...around(words) };
}

function middle(word: Placed): number {
  return (word.y0 + word.y1) / 2;
}

function groupByLine(words: readonly Placed[]): Placed[][] {
  const groups: { words: Placed[]; middle: number; size: number }[] = [];
  for (const word of [...words].sort((a, b) => middle(a) - middle(b))) {
    const last = groups[groups.length - 1];
    const near = last !== undefined && middle(word) - last.middle < SAME_LINE * Math.min(last.size, word.size);
    if (last !== undefined && near) last.words.push(word);
    else groups.push({ words: [word], middle: middle(word), size: word.size });
  }
  return groups.map((group) => group.words.sort((a, b) => a.x0 - b.x0));
}

/** Lines of the whole width and, where parts stand side by side, the lines of each part together. */
function ordered(words: readonly Placed[], edges: readonly Edge[]): Placed[][] {
  if (edges.length === 0) return groupByLine(words);
  const parts = new Map<string, { y: number; part: number; words: Placed[] }>();
  const sections = [...edges].sort((a, b) => a.y0 - b.y0);
  for (const word of words) {
    const part = partAt(edges, (word.x0 + word.x1) / 2, middle(word));
    const section =
      part === 0
        ? sections.filter((edge) => edge.y1 <= middle(word)).length + 0.5
        : sections.filter((edge) => edge.y0 < middle(word)).length;
    const key = `${part === 0 ? 'whole' : 'part'} ${part === 0 ? section : ''} ${part}`;
    const group = parts.get(key) ?? { y: middle(word), part, words: [] };
    group.words.push(word);
    group.y = Math.min(group.y, middle(word));
    parts.set(key, group);
  }
  return [...parts.values()].sort((a, b) => a.y - b.y || a.part - b.part).flatMap((group) => groupByLine(group.words));
}

/** Stage 2. Words to lines, lines to phrases, by position alone. */
export function linesOf(page: Upright, edges: readonly Edge[] = []): Line[] {
  const all = [...page.words, ...uprightHeads(page)];
  return ordered(all, edges).map((words, index) => {
    const phrases: Phrase[] = [];
    let run: Placed[] = [];
    for (const word of words) {
      const last = run[run.length - 1];
      const gap = last === undefined ? 0 : word.x0 - last.x1;
      if (last !== undefined && gap > BETWEEN_PHRASES * Math.min(last.size, word.size)) {
        phrases.push(phraseOf(page, index, run));
        run = [];
      }
      run.push(word);
    }
    if (run.length > 0) phrases.push(phraseOf(page, index, run));
    const { y0, y1, size } = around(words);
    return { page, index, phrases, text: phrases.map((phrase) => phrase.text).join('  '), y0, y1, size };
  });
}
