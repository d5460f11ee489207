import { tQuantile } from '../quantiles';
import type { Verdict } from './types';

/**
 * The seven lines. Everything is read off one 90 % interval, so all claims are true together whenever it covers the truth.
 *
 * Shape: partitioning as in three-sided testing (Goeman, Solari and Stijnen, Stat Med 29:2117-2125, 2010); "as intended"
 * is the two one-sided tests of equivalence at 5 % each (Schuirmann 1987, as documented by SAS). All figures are turned so
 * that the intended direction is positive: 0 < half < nearLow < full < nearHigh < oneAndAHalf; a point may be infinite.
 * Worked example: a fall of 0.46 seen (s 0.08, 16 df) where 0.5 was planned is "as intended".
 */
export type Interval = { readonly lo: number; readonly estimate: number; readonly hi: number };

export type Zone = {
  readonly half: number;
  readonly nearLow: number;
  readonly full: number;
  readonly nearHigh: number;
  readonly oneAndAHalf: number;
};

export const CONFIDENCE_PER_SIDE = 0.95;

export function verdictOf(at: Interval, zone: Zone, options: { readonly censored?: boolean } = {}): Verdict {
  if (at.hi < 0) return 'went the other way';
  if (at.lo <= 0 && at.hi < zone.half) return 'no change seen';
  const inside = at.lo >= zone.half && at.hi <= zone.oneAndAHalf;
  const near = at.estimate >= zone.nearLow && at.estimate <= zone.nearHigh;
  if (inside && near && options.censored !== true) return 'as intended';
  if (at.hi < zone.full) return 'short of it';
  if (at.lo > zone.full) return 'beyond it';
  return at.lo > 0 ? 'right way, size not settled' : 'cannot tell yet';
}

const SHARES = [0.5, 2 / 3, 1, 4 / 3, 1.5] as const;

const zoneFrom = (point: (share: number) => number): Zone => ({
  half: point(SHARES[0]),
  nearLow: point(SHARES[1]),
  full: point(SHARES[2]),
  nearHigh: point(SHARES[3]),
  oneAndAHalf: point(SHARES[4]),
});

/** Thresholds for a change judged in its own unit. */
export const additiveZone = (intended: number): Zone => zoneFrom((share) => share * Math.abs(intended));

/**
 * Thresholds for a concentration on natural logs: ln(1 + share x I / before); for a fall its negative, and infinity where
 * the share would be more than everything that was there.
 */
export function logZone(intended: number, before: number): Zone {
  const sign = Math.sign(intended);
  return zoneFrom((share) => {
    const left = 1 + (share * intended) / before;
    return left > 0 ? sign * Math.log(left) : Number.POSITIVE_INFINITY;
  });
}

/** Interval of an estimate, turned so that `direction` (+1 or -1) is positive. */
export function turnedInterval(D: number, s: number, nu: number, direction: number): Interval & { readonly q: number } {
  const q = tQuantile(CONFIDENCE_PER_SIDE, nu);
  const estimate = D * Math.sign(direction);
  return { lo: estimate - q * s, estimate, hi: estimate + q * s, q };
}
