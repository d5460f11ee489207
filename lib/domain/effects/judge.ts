import { tQuantile } from '../quantiles';
import type { IntendedNow } from './intended';
import type { LowEstimate } from './low-values';
import type { Estimate } from './reading';
import { verdictSentence } from './sentences';
import type { Reading, WorkingScale } from './types';
import { additiveZone, CONFIDENCE_PER_SIDE, logZone, turnedInterval, verdictOf } from './verdict';
import type { Speaker } from './words';

/** From an estimate and the intention to a reading with its verdict, in working and natural units. */
export function judge(
  estimate: Estimate,
  scale: Exclude<WorkingScale, 'low-values'>,
  intention: IntendedNow,
  withControls: boolean,
  speaker: Speaker,
): Reading {
  const intended = intention.byThen;
  const s = Math.sqrt(estimate.variance);
  const at = turnedInterval(estimate.D, s, estimate.nu, intended);
  const isLog = scale === 'log';
  const before = isLog ? Math.exp(estimate.correctedBefore) : estimate.correctedBefore;
  const verdict = verdictOf(at, isLog ? logZone(intended, before) : additiveZone(intended));
  const [lo, hi] = [estimate.D - at.q * s, estimate.D + at.q * s];
  const natural = (change: number): number => (isLog ? before * Math.expm1(change) : change);
  const rawBefore = isLog ? Math.exp(estimate.rawBefore) : estimate.rawBefore;
  const reading = {
    withControls,
    scale,
    D: estimate.D,
    s,
    nu: estimate.nu,
    q: at.q,
    lo,
    hi,
    verdict,
    change: natural(estimate.D),
    changeLo: natural(lo),
    changeHi: natural(hi),
    correctedBefore: before,
    correction: rawBefore - before,
    rho: estimate.site.rho,
    components: estimate.components,
  };
  return { ...reading, sentence: verdictSentence(reading, intention, speaker) };
}

export function judgeLow(low: LowEstimate, intention: IntendedNow, withControls: boolean, speaker: Speaker): Reading {
  const intended = intention.byThen;
  const s = Math.sqrt(low.variance);
  const q = tQuantile(CONFIDENCE_PER_SIDE, low.nu);
  const { lo, estimate, hi } = low.interval(q);
  const turned = intended < 0 ? { lo: -hi, estimate: -estimate, hi: -lo } : { lo, estimate, hi };
  const reading = {
    withControls,
    scale: 'low-values' as const,
    D: estimate,
    s,
    nu: low.nu,
    q,
    lo,
    hi,
    verdict: verdictOf(turned, additiveZone(intended), { censored: low.censored }),
    change: estimate,
    changeLo: lo,
    changeHi: hi,
    correctedBefore: low.before.value,
    correction: 0,
    rho: 1,
    components: low.components,
  };
  return { ...reading, sentence: verdictSentence(reading, intention, speaker) };
}
