import type { Page, Reading, Word } from '../types';
import { classOf, digitsOf, type WordClass } from './tokens';
import { identityLabelLength, NAME_LIKE, plain, SPELLINGS_WITH_NAMES, STRONG_WORDS } from './vocabulary';

type Item = {
  at: number;
  text: string;
  kind: WordClass;
  x0: number;
  y0: number;
  x1: number;
  y1: number;
  size: number;
};
/** Words that stand close beside each other: a phrase, or one cell. */
type Run = Item[];

const GAP = 0.9;

/** In points, turned so that the text of its direction runs from left to right. */
function upright(word: Word, at: number, page: Page): Item {
  const [w, h] = [page.width, page.height];
  const [a, b, c, d] = [word.x0 * w, word.y0 * h, word.x1 * w, word.y1 * h];
  const rest = { at, text: word.text, kind: classOf(word.text), size: word.size };
  if (word.direction === 90) return { ...rest, x0: b, y0: w - c, x1: d, y1: w - a };
  if (word.direction === 180) return { ...rest, x0: w - c, y0: h - d, x1: w - a, y1: h - b };
  if (word.direction === 270) return { ...rest, x0: h - d, y0: a, x1: h - b, y1: c };
  return { ...rest, x0: a, y0: b, x1: c, y1: d };
}

function linesOf(items: readonly Item[]): Run[][] {
  const lines: Item[][] = [];
  for (const item of [...items].sort((a, b) => a.y0 + a.y1 - b.y0 - b.y1)) {
    const line = lines.at(-1);
    const first = line?.[0];
    const middle = (item.y0 + item.y1) / 2;
    if (line && first && middle > first.y0 && middle < first.y1) line.push(item);
    else lines.push([item]);
  }
  return lines.map((line) => {
    const runs: Run[] = [];
    for (const item of line.sort((a, b) => a.x0 - b.x0)) {
      const run = runs.at(-1);
      const before = run?.at(-1);
      if (run && before && item.x0 - before.x1 < GAP * Math.max(item.size, before.size)) run.push(item);
      else runs.push([item]);
    }
    return runs;
  });
}

/** A name-like word stands here as a method only where a known spelling of it does. */
function standsAsMethod(word: string, run: Run): boolean {
  const text = ` ${plain(run.map((item) => item.text).join(' '))} `;
  return SPELLINGS_WITH_NAMES.some((spelling) => spelling.split(' ').includes(word) && text.includes(` ${spelling} `));
}

function hideInRun(run: Run, hidden: Set<number>): void {
  const mixed = run.some((item) => item.kind === 'unknown');
  const numbers = run.filter((item) => item.kind === 'number');
  const whole = numbers.filter((item) => !/[.,]\d/.test(item.text));
  // "555 123 4567": several whole numbers in one breath are no values.
  const telephone = whole.length > 1 && whole.reduce((sum, item) => sum + digitsOf(item.text), 0) >= 7;
  for (const item of run) {
    const words = plain(item.text).split(' ');
    if (item.kind === 'unknown') hidden.add(item.at);
    else if (mixed && item.kind !== 'mark' && !words.every((word) => STRONG_WORDS.has(word))) hidden.add(item.at);
    else if (telephone && item.kind === 'number') hidden.add(item.at);
    else if (words.some((word) => NAME_LIKE.has(word) && (mixed || !standsAsMethod(word, run)))) hidden.add(item.at);
  }
}

const hideAll = (run: Run, hidden: Set<number>) => {
  for (const item of run) if (item.kind !== 'mark') hidden.add(item.at);
};

/** What follows an identity caption on its line, and what stands right under it. */
function hideIdentity(lines: readonly Run[][], hidden: Set<number>): void {
  lines.forEach((line, lineAt) => {
    line.forEach((run, runAt) => {
      const length = identityLabelLength(run.map((item) => item.text));
      const [first] = run;
      if (length === 0 || !first) return;
      hideAll(run.slice(length), hidden);
      const next = line[runAt + 1];
      const caption = next?.[0]?.kind === 'known' || identityLabelLength(next?.map((item) => item.text) ?? []) > 0;
      if (next && !caption && run.length === length) hideAll(next, hidden);
      const right = run[length - 1]?.x1 ?? first.x1;
      for (const below of lines.slice(lineAt + 1, lineAt + 3)) {
        for (const other of below) {
          const [start] = other;
          const end = other.at(-1);
          if (!start || !end || start.y0 - first.y1 > 2 * first.size) continue;
          if (start.x0 < right && end.x1 > first.x0 && start.kind !== 'known') hideAll(other, hidden);
        }
      }
    });
  });
}

function hideLabName(lines: readonly Run[][], name: string | null, hidden: Set<number>): void {
  const wanted = plain(name ?? '');
  if (wanted === '') return;
  for (const line of lines) {
    const text = plain(
      line
        .flat()
        .map((item) => item.text)
        .join(' '),
    );
    if (text.includes(wanted)) hideAll(line.flat(), hidden);
  }
}

const inside = (word: Word, box: readonly [number, number, number, number]): boolean => {
  const [x, y] = [(word.x0 + word.x1) / 2, (word.y0 + word.y1) / 2];
  return x > box[0] && x < box[2] && y > box[1] && y < box[3];
};

/** Names, numbers and days that the reader took for a sample's identity, wherever else they stand. */
function hideSampleNames(page: Page, reading: Reading, hidden: Set<number>): void {
  const names = new Set(
    reading.samples
      .flatMap((one) => [one.sampleId, one.labNumber, one.fieldName, one.dateSampledPrinted, one.dateReportedPrinted])
      .flatMap((text) => plain(text ?? '').split(' '))
      .filter((token) => /\d/.test(token)),
  );
  const boxes = reading.samples
    .flatMap((one) => one.results)
    .flatMap((one) => (one.page === page.number && one.box ? [one.box] : []));
  page.words.forEach((word, at) => {
    if (!names.has(plain(word.text)) || boxes.some((box) => inside(word, box))) return;
    hidden.add(at);
  });
}

/**
 * Which words of a page may be shown when the page is handed on. Purpose: a report of a fault needs the numbers and what
 * they stand beside, never whose they are. Shown are values, units, analytes, methods, ratings and headings that the
 * registry knows; everything else is hidden, and with it whatever stands in one phrase with a word nobody knows, after or
 * under a caption of identity, in the laboratory's name, or reads like a telephone, postal or account number.
 * Input: a page with its words, and the reading of it. Output: for each word, in the same order, whether it may be shown.
 * Errors: none. No published source: the rule is this program's own and errs towards hiding.
 */
export function shownWords(page: Page, reading: Reading): boolean[] {
  const hidden = new Set<number>();
  const items = page.words.map((word, at) => upright(word, at, page));
  for (const direction of [0, 90, 180, 270] as const) {
    const lines = linesOf(items.filter((item) => page.words[item.at]?.direction === direction));
    for (const line of lines) for (const run of line) hideInRun(run, hidden);
    hideIdentity(lines, hidden);
    hideLabName(lines, reading.lab.name, hidden);
  }
  hideSampleNames(page, reading, hidden);
  return page.words.map((_, at) => !hidden.has(at));
}
