import { comparable, sameLaboratory } from '../effects/comparable';
import type { RefusalCode, TestPoint } from '../effects/types';
import { isSameSeason } from '../sampling';

/**
 * Where a line through tests must stop: another method, depth, unit or laboratory. The two parts keep their own marks and
 * are never joined. A trend is taken from the last unbroken part, and of it only from the season with the most tests.
 */
export type BreakReason = 'method' | 'depth' | 'unit' | 'laboratory' | 'not-comparable';

export type DriftBreak = {
  readonly before: TestPoint;
  readonly after: TestPoint;
  readonly reason: BreakReason;
  readonly sentence: string;
};

const REASONS: Partial<Record<RefusalCode, BreakReason>> = {
  extractant: 'method',
  'ph-medium': 'method',
  'om-method': 'method',
  'cec-method': 'method',
  'method-unknown': 'method',
  depth: 'depth',
  'unit-basis': 'unit',
};

const WORDS: Readonly<Record<BreakReason, string>> = {
  method: 'The method changed here, so the line is not joined.',
  depth: 'The sampling depth changed here, so the line is not joined.',
  unit: 'The unit changed here, so the line is not joined.',
  laboratory: 'The laboratory changed here, so the line is not joined.',
  'not-comparable': 'These two tests cannot be compared, so the line is not joined.',
};

function breakBetween(before: TestPoint, after: TestPoint): DriftBreak | null {
  // Against a limit the values still belong to one series: only how they were got decides.
  const bare = (test: TestPoint): TestPoint => ({ ...test, qualifier: 'exact' });
  const may = comparable(bare(before), bare(after));
  const reason = may.ok
    ? sameLaboratory(before, after)
      ? null
      : 'laboratory'
    : (REASONS[may.reason] ?? 'not-comparable');
  return reason === null ? null : { before, after, reason, sentence: WORDS[reason] };
}

export function splitRuns(sorted: readonly TestPoint[]): {
  readonly runs: readonly (readonly TestPoint[])[];
  readonly breaks: readonly DriftBreak[];
} {
  const runs: TestPoint[][] = [];
  const breaks: DriftBreak[] = [];
  for (const test of sorted) {
    const run = runs.at(-1);
    const last = run?.at(-1);
    const gap = last === undefined ? null : breakBetween(last, test);
    if (gap !== null) breaks.push(gap);
    if (run === undefined || gap !== null) runs.push([test]);
    else run.push(test);
  }
  return { runs, breaks };
}

/** The tests of the season that most of them share; the newest test's season when two have as many. */
export function mainSeason(run: readonly TestPoint[]): readonly TestPoint[] {
  let best: readonly TestPoint[] = [];
  for (const anchor of run) {
    const group = run.filter((test) => isSameSeason(test.day, anchor.day));
    if (group.length >= best.length) best = group;
  }
  return best;
}
