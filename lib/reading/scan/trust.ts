import { remark } from '../candidate';
import type { Reading, ReadResult, Remark } from '../types';
import type { Merged, ScannedPage } from './types';

/** Where a number stands on a level page, and the words that make it. */
export type Spot = {
  readonly page: number;
  readonly words: readonly Merged[];
  readonly box: { readonly x0: number; readonly y0: number; readonly x1: number; readonly y1: number };
};

/** The characters of a number that matter when two looks are compared. */
export function figuresOf(text: string): string {
  return text
    .replace(/\s/g, '')
    .replace(/,(?=\d{3}\b)/g, '')
    .replace(/,/g, '.')
    .replace(/[^\d.<>]/g, '')
    .replace(/\.$/, '');
}

const withoutPoint = (text: string) => text.replace(/\./g, '');

/** The words of one result; a word belongs to it when its middle lies in the result's box. */
export function spotOf(result: ReadResult, page: ScannedPage, words: readonly Merged[]): Spot | null {
  if (result.box === null) return null;
  const [x0, y0, x1, y1] = result.box;
  const box = { x0: x0 * page.width, y0: y0 * page.height, x1: x1 * page.width, y1: y1 * page.height };
  const slack = 0.3 * page.letter;
  const mine = words.filter((word) => {
    const cy = (word.y0 + word.y1) / 2;
    const shared = Math.min(word.x1, box.x1) - Math.max(word.x0, box.x0);
    const least = Math.min(word.x1 - word.x0, box.x1 - box.x0);
    return cy > box.y0 - slack && cy < box.y1 + slack && shared > 0.5 * least && /[\d<>A-Za-z]/.test(word.text);
  });
  return { page: page.number, words: mine, box };
}

export type Judged = { readonly ceiling: number; readonly doubts: readonly Remark[] };

/** Highest confidence of a number from a scan, by what speaks for it. Set on tuning scans; see the reading tests. */
const CEILING = {
  /** Both views, the second look and the ink say the same. */
  agreed: 0.98,
  /** Two of three looks say the same, and none says another. */
  mostly: 0.95,
  /** One look only. */
  alone: 0.75,
  /** Another look says otherwise, but less is for it. */
  outvoted: 0.85,
  conflict: 0.5,
  point: 0.6,
} as const;

/** What the looks at one number are worth. `again` is the second look at it alone, or null when it was not taken. */
export function judge(result: ReadResult, spot: Spot, again: string | null): Judged {
  const printed = figuresOf(result.printed);
  if (spot.words.length === 0) return { ceiling: CEILING.alone, doubts: [] };
  const support = Math.min(...spot.words.map((word) => word.support));
  const of = Math.max(...spot.words.map((word) => word.of));
  const certainty = Math.min(...spot.words.map((word) => word.certainty));
  const inkShowsPoint = spot.words.some((word) => word.point === 'seen' || word.point === 'added');
  const isOther = (text: string) => {
    const figures = figuresOf(text);
    if (figures === '' || figures === printed) return false;
    // A look that lost the point which the ink shows is no other reading.
    return !(inkShowsPoint && withoutPoint(figures) === withoutPoint(printed) && !figures.includes('.'));
  };
  const second = again === null ? '' : figuresOf(again);
  const others = [
    ...new Set([...spot.words.flatMap((word) => word.others), again ?? ''].filter(isOther).map(figuresOf)),
  ];
  const secondAgrees = second === printed || (second !== '' && !isOther(second));
  const votes = support + (secondAgrees ? 1 : 0);
  const doubts: Remark[] = [];
  if (others.length > 0)
    doubts.push(remark('two-readings', `Two readings differ: ${result.printed} / ${others.slice(0, 2).join(' / ')}.`));
  const lost = spot.words.some((word) => word.point === 'not-seen') && printed.includes('.');
  const unsure = spot.words.some((word) => word.point === 'added') && !second.includes('.');
  if (lost)
    doubts.push(remark('decimal-point', `No decimal point can be seen in ${result.printed}; look at the page.`));
  if (lost) return { ceiling: CEILING.point, doubts };
  // A faint comma between thousands looks like a point, to every look alike.
  if (/^[<>]?\d{1,3}\.\d{3}$/.test(printed) && result.printed.includes('.')) {
    doubts.push(remark('decimal-point', `The point in ${result.printed} may be a comma; look at the page.`));
    return { ceiling: CEILING.point, doubts };
  }
  if (others.length > 0)
    return { ceiling: votes >= 2 && votes > others.length ? CEILING.outvoted : CEILING.conflict, doubts };
  if (votes <= 1) {
    doubts.push(remark('one-look', 'Only one of several looks at the page saw this number.'));
    return { ceiling: CEILING.alone, doubts };
  }
  if (votes === of + 1 && certainty > 0.6 && !unsure) return { ceiling: CEILING.agreed, doubts };
  return { ceiling: certainty > 0.75 && !unsure ? CEILING.mostly : CEILING.outvoted, doubts };
}

/**
 * A whole number where every other sample prints decimals has probably lost its point. Nothing is changed: the number is
 * doubted, and the grower sees it beside the page.
 */
export function pointDoubts(reading: Reading): Map<ReadResult, Remark> {
  const found = new Map<ReadResult, Remark>();
  const groups = new Map<string, ReadResult[]>();
  for (const result of reading.samples.flatMap((sample) => sample.results)) {
    const key = `${result.analyte}|${result.unit}|${result.method}`;
    groups.set(key, [...(groups.get(key) ?? []), result]);
  }
  for (const group of groups.values()) {
    for (const result of group) {
      const rest = group.filter((other) => other !== result);
      const pointed = rest.filter((other) => other.printed.includes('.')).length;
      if (result.printed.includes('.') || !/\d\d/.test(result.printed) || pointed < 2 || pointed < rest.length)
        continue;
      found.set(
        result,
        remark(
          'decimal-point',
          `${result.printed} has no decimal point, the same test of the other samples has; look at the page.`,
        ),
      );
    }
  }
  return found;
}
