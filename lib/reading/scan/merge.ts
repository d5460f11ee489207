import type { Merged, Seen } from './types';
import { isKnown, isNumber } from './vocabulary';

type Numbered = Seen & { readonly view: number };
type Group = { members: Numbered[] };

function overlap(a: Seen, b: Seen): number {
  const w = Math.min(a.x1, b.x1) - Math.max(a.x0, b.x0);
  const h = Math.min(a.y1, b.y1) - Math.max(a.y0, b.y0);
  if (w <= 0 || h <= 0) return 0;
  const area = (one: Seen) => (one.x1 - one.x0) * (one.y1 - one.y0) || 1;
  return (w * h) / Math.min(area(a), area(b));
}

/** Lines, specks and shades that the engine took for writing. */
function isRubbish(word: Seen, letter: number): boolean {
  const [w, h] = [word.x1 - word.x0, word.y1 - word.y0];
  if (!/[A-Za-z0-9%<>]/.test(word.text)) return !/^[-–—.]+$/.test(word.text) || w > 6 * letter || word.certainty < 0.4;
  if (h > 6 * letter || h < 0.25 * letter) return true;
  if (word.text === '%') return false;
  if (word.certainty < 0.12) return true;
  // A word far wider than its letters can be is a line or a picture.
  return w > (word.text.length + 1) * Math.max(h, letter) * 1.6 && word.certainty < 0.6;
}

/** A word that lies over words of several lines of another view is two lines taken for one. */
function overSeveralLines(words: readonly Numbered[]): ReadonlySet<Numbered> {
  const found = new Set<Numbered>();
  const sorted = [...words].sort((a, b) => a.y0 - b.y0);
  for (const word of words) {
    const tall = word.y1 - word.y0;
    const under = sorted.filter(
      (other) =>
        other.view !== word.view &&
        other.y0 < word.y1 &&
        other.y1 > word.y0 &&
        other.y1 - other.y0 < tall / 1.6 &&
        overlap(word, other) > 0.4,
    );
    const [top, bottom] = [under[0], under[under.length - 1]];
    if (top !== undefined && bottom !== undefined && bottom.y0 > top.y1 - 0.2 * (top.y1 - top.y0)) found.add(word);
  }
  return found;
}

/** Words of all views that stand in one place. */
function groupsOf(words: readonly Numbered[]): Group[] {
  const sorted = [...words].sort((a, b) => a.y0 - b.y0);
  const parent = sorted.map((_, index) => index);
  const root = (at: number): number => {
    let one = at;
    while (parent[one] !== one) one = parent[one] ?? one;
    return one;
  };
  for (const [index, word] of sorted.entries()) {
    for (let other = index + 1; other < sorted.length; other++) {
      const next = sorted[other];
      if (next === undefined || next.y0 > word.y1) break;
      if (next.view !== word.view && overlap(word, next) > 0.4) parent[root(other)] = root(index);
    }
  }
  const groups = new Map<number, Group>();
  for (const [index, word] of sorted.entries()) {
    const at = root(index);
    const group = groups.get(at) ?? { members: [] };
    group.members.push(word);
    groups.set(at, group);
  }
  return [...groups.values()];
}

const joined = (words: readonly Seen[]) =>
  words
    .map((word) => word.text)
    .join('')
    .replace(/[^A-Za-z0-9.,<>%+:/-]/g, '');

/** What is more likely printed in a report than not. */
function likely(words: readonly Seen[]): number {
  const score = words.reduce(
    (sum, word) => sum + (isNumber(word.text) || isKnown(word.text) ? word.text.length : 0),
    0,
  );
  return (
    score /
    Math.max(
      1,
      words.reduce((sum, word) => sum + word.text.length, 0),
    )
  );
}

function heightOf(words: readonly Seen[]): number {
  return Math.max(...words.map((word) => word.y1 - word.y0));
}

function certaintyOf(words: readonly Seen[]): number {
  const letters = words.reduce((sum, word) => sum + word.text.length, 0);
  return words.reduce((sum, word) => sum + word.certainty * word.text.length, 0) / (letters || 1);
}

/**
 * One list of words out of the views. Where views agree the word gains; where they differ the better supported reading
 * stands and the other is kept beside it. A word that only one view saw stays, with the support of one.
 */
export function mergeViews(views: readonly (readonly Seen[])[], letter: number): Merged[] {
  const words = views.flatMap((view, index) =>
    view.filter((word) => !isRubbish(word, letter)).map((word) => ({ ...word, view: index })),
  );
  const merged: Merged[] = [];
  const wide = overSeveralLines(words);
  for (const { members } of groupsOf(words.filter((word) => !wide.has(word)))) {
    const byView = views
      .map((_, view) => members.filter((word) => word.view === view).sort((a, b) => a.x0 - b.x0))
      .filter((list) => list.length > 0);
    const texts = byView.map(joined);
    const lowest = Math.min(...byView.map(heightOf)) || 1;
    const scored = byView.map((list, index) => {
      const votes = texts.filter((text) => text === texts[index]).length;
      // Of equal readings the one with the closer box: the other reaches into a neighbour's line.
      const loose = heightOf(list) / lowest - 1;
      return { list, votes, score: votes + certaintyOf(list) + 0.5 * likely(list) - 0.1 * loose };
    });
    const best = scored.reduce((a, b) => (b.score > a.score ? b : a));
    const text = joined(best.list);
    const others = [...new Set(texts.filter((other) => other !== text))];
    for (const { view: _, ...word } of best.list) {
      // Of a wide group only the words that are missing elsewhere are in doubt.
      const inOther = (list: readonly Seen[]) =>
        list.some((other) => overlap(word, other) > 0.4 && joined([other]) === joined([word]));
      const support = byView.filter(inOther).length;
      const against =
        support === byView.length
          ? []
          : best.list.length === 1
            ? others
            : byView.flatMap((list) => {
                const there = list.filter((other) => overlap(word, other) > 0.4);
                const seen = joined(there);
                return there.length === 0 || seen === joined([word]) || there.length > 1 ? [] : [seen];
              });
      merged.push({
        ...word,
        certainty: word.certainty,
        support,
        others: [...new Set(against)],
        of: views.length,
        point: 'unknown',
      });
    }
  }
  return merged;
}
