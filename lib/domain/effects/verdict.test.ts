import { describe, expect, it } from 'vitest';
import { VERDICTS } from './types';
import { additiveZone, logZone, verdictOf } from './verdict';

/** The lines as they are defined, each on its own; the claim each one makes about a true change of `share` of the plan. */
const LINES: Readonly<Record<(typeof VERDICTS)[number], (lo: number, d: number, hi: number) => boolean>> = {
  'went the other way': (_, __, hi) => hi < 0,
  'no change seen': (lo, _, hi) => lo <= 0 && hi < 0.5,
  'as intended': (lo, d, hi) => lo >= 0.5 && hi <= 1.5 && d >= 2 / 3 && d <= 4 / 3,
  'short of it': (_, __, hi) => hi < 1,
  'beyond it': (lo) => lo > 1,
  'right way, size not settled': (lo) => lo > 0,
  'cannot tell yet': () => true,
};
const ORDER = [
  'went the other way',
  'no change seen',
  'as intended',
  'short of it',
  'beyond it',
  'right way, size not settled',
  'cannot tell yet',
] as const;

const CLAIMS: Readonly<Record<(typeof VERDICTS)[number], (share: number) => boolean>> = {
  'went the other way': (share) => share < 0,
  'no change seen': (share) => share < 0.5,
  'as intended': (share) => share >= 0.5 && share <= 1.5,
  'short of it': (share) => share < 1,
  'beyond it': (share) => share > 1,
  'right way, size not settled': (share) => share > 0,
  'cannot tell yet': () => true,
};

function eachInterval(check: (lo: number, middle: number, hi: number) => void): void {
  for (let left = -60; left <= 90; left += 1) {
    for (let width = 1; width <= 80; width += 1) {
      const [lo, hi] = [left / 30, (left + width) / 30];
      check(lo, (lo + hi) / 2, hi);
    }
  }
}

describe('the seven lines', () => {
  it('answer every interval with the first line that fits, and leave no gap', () => {
    const seen = new Set<string>();
    eachInterval((lo, middle, hi) => {
      const expected = ORDER.find((name) => LINES[name](lo, middle, hi));
      const verdict = verdictOf({ lo, estimate: middle, hi }, additiveZone(1));
      if (verdict !== expected) throw new Error(`${lo} to ${hi}: ${verdict} instead of ${expected}`);
      seen.add(verdict);
    });
    expect([...seen].toSorted()).toEqual([...VERDICTS].toSorted());
  });

  it('say nothing false of any true change that the interval covers', () => {
    eachInterval((lo, middle, hi) => {
      const verdict = verdictOf({ lo, estimate: middle, hi }, additiveZone(1));
      for (const share of [lo + 1e-9, middle, hi - 1e-9]) {
        if (!CLAIMS[verdict](share)) throw new Error(`${verdict} is false of ${share}, which ${lo} to ${hi} covers`);
      }
    });
  });

  it('put a log zone in order, and infinity where a share of a fall is more than everything', () => {
    const zone = logZone(-80, 100);
    expect(zone.half).toBeCloseTo(-Math.log(0.6), 12);
    expect([zone.nearHigh, zone.oneAndAHalf]).toEqual([Number.POSITIVE_INFINITY, Number.POSITIVE_INFINITY]);
    const rise = logZone(45, 118);
    expect(rise.half < rise.nearLow && rise.nearLow < rise.full && rise.full < rise.oneAndAHalf).toBe(true);
  });

  it('never call a value below the limit "as intended"', () => {
    const at = { lo: 0.8, estimate: 1, hi: 1.2 };
    expect(verdictOf(at, additiveZone(1))).toBe('as intended');
    expect(verdictOf(at, additiveZone(1), { censored: true })).toBe('right way, size not settled');
  });
});
