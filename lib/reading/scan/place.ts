import type { Seen } from './types';

/** Reach of each character above and below the baseline, as shares of the type size; usual for printed sans and serif. */
const TALL = 0.72;
const LOW = 0.53;
const DEEP = 0.21;

function reach(text: string): { up: number; down: number } {
  let [up, down] = [0, 0];
  for (const character of text) {
    if (/[acemnorsuvwxz]/.test(character)) up = Math.max(up, LOW);
    else if (/[gpqy]/.test(character)) [up, down] = [Math.max(up, LOW), DEEP];
    else if (/[()[\]{}/|jQ$]/.test(character)) [up, down] = [Math.max(up, TALL), Math.max(down, 0.18)];
    else if (/[,;]/.test(character)) down = Math.max(down, 0.14);
    else if (/[.:_]/.test(character)) up = Math.max(up, 0.1);
    else if (/[-–—~=+<>]/.test(character)) up = Math.max(up, 0.45);
    else up = Math.max(up, TALL);
  }
  return { up, down };
}

export type Set = {
  readonly size: number;
  readonly base: number;
  /** Width that each character takes in typewriter type. */
  readonly advance?: number;
};

function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[Math.floor(sorted.length / 2)] ?? 0;
}

/** Size of type and baseline of one word from the box of its ink; null for words of marks only, whose ink tells neither. */
function ownSet(word: Seen): Set | null {
  if (!/[A-Za-z0-9]/.test(word.text)) return null;
  const { up, down } = reach(word.text);
  const size = (word.y1 - word.y0) / (up + down);
  return { size, base: word.y1 - down * size };
}

/** Advance of a typewriter's characters as a share of the type size. */
const TYPEWRITER_ADVANCE = 0.6;

/** Words long enough to tell the pitch of their type. */
const LONG_WORD = /^[A-Za-z0-9./%-]{5,}$/;

function pitchOf(word: Seen): number {
  return (word.x1 - word.x0) / (word.text.length - 0.25);
}

/**
 * The type size that the pitch tells, for a page set in typewriter type; null for any other. There all characters are as
 * wide, so the long words of one line have one pitch, which in other type they have only by chance; and its capitals are
 * lower than other type's, so that their height misleads.
 */
function typewriter(words: readonly Seen[]): ((word: Seen) => number | null) | null {
  const long = words.filter((word) => LONG_WORD.test(word.text) && word.certainty > 0.7);
  const besideOf = (word: Seen) =>
    long.filter((other) => other !== word && Math.abs(other.y0 + other.y1 - word.y0 - word.y1) < word.y1 - word.y0);
  const told = long
    .map((word) => ({ pitch: pitchOf(word), beside: besideOf(word) }))
    .filter((one) => one.beside.length > 0);
  const same = told.filter(({ pitch, beside }) =>
    beside.every((other) => Math.abs(pitchOf(other) - pitch) < 0.05 * Math.max(pitch, pitchOf(other))),
  );
  if (told.length < 8 || same.length < 0.8 * told.length) return null;
  return (word) => {
    const own = LONG_WORD.test(word.text) ? [word] : [];
    const line = [...besideOf(word), ...own];
    return line.length === 0 ? null : median(line.map(pitchOf)) / TYPEWRITER_ADVANCE;
  };
}

/**
 * Type size and baseline of each word, evened out with its neighbours on the same line: ink boxes differ with the
 * letters in them, and the stages of the reader compare baselines and sizes.
 */
export function setOf(words: readonly Seen[]): Map<Seen, Set> {
  const typed = typewriter(words);
  const own = words.map((word) => {
    const set = ownSet(word);
    const size = typed === null || set === null ? null : typed(word);
    return {
      word,
      set: set !== null && size !== null && size > set.size && size < 1.7 * set.size ? { ...set, size } : set,
    };
  });
  const usual = median(own.flatMap(({ set }) => set?.size ?? [])) || 1;
  const known = own.flatMap(({ word, set }) => (set === null ? [] : [{ word, set }]));
  const sets = new Map<Seen, Set>();
  for (const { word, set } of own) {
    const rough = set ?? { size: usual, base: (word.y0 + word.y1) / 2 + 0.25 * usual };
    const near = known.filter(
      (other) =>
        Math.abs(other.set.base - rough.base) < 0.35 * rough.size &&
        (set === null || Math.max(other.set.size, rough.size) < 1.3 * Math.min(other.set.size, rough.size)) &&
        Math.abs(other.word.x0 + other.word.x1 - word.x0 - word.x1) < 40 * rough.size,
    );
    if (near.length === 0) sets.set(word, rough);
    else {
      // A longer word measures its type better than a single letter.
      const weighted = (pick: (one: Set) => number) =>
        median(near.flatMap((one) => Array(Math.min(8, one.word.text.length)).fill(pick(one.set))));
      sets.set(word, { size: weighted((one) => one.size), base: weighted((one) => one.base) });
    }
  }
  const placed = snapped(sets);
  if (typed === null) return placed;
  return new Map([...placed].map(([word, set]) => [word, { ...set, advance: set.size * TYPEWRITER_ADVANCE }]));
}

/** Words that stand on one line get one baseline, and one size where theirs hardly differ. */
function snapped(sets: ReadonlyMap<Seen, Set>): Map<Seen, Set> {
  const sorted = [...sets].sort(([, a], [, b]) => a.base - b.base);
  const out = new Map<Seen, Set>();
  let line: [Seen, Set][] = [];
  const close = () => {
    const base = median(line.map(([, set]) => set.base));
    const size = median(line.map(([, set]) => set.size));
    for (const [word, set] of line) {
      const same = Math.max(set.size, size) < 1.12 * Math.min(set.size, size);
      out.set(word, { base, size: same ? size : set.size });
    }
    line = [];
  };
  for (const entry of sorted) {
    const first = line[0];
    if (first !== undefined && entry[1].base - first[1].base > 0.3 * Math.min(first[1].size, entry[1].size)) close();
    line.push(entry);
  }
  close();
  return out;
}
