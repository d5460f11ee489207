import { normalQuantile, normalTail } from '../quantiles';
import { CONFIDENCE_PER_SIDE } from './verdict';

/**
 * Planning: how small the standard error must be. Power of a one-sided 5 % test, and of the two one-sided tests when the
 * truth is the plan. Worked example: a change of 0.5 is seen against zero 8 times in 10 when s is at most 0.201.
 */
export type Aim = 'see' | 'size';
const WANTED = 0.8;
const ZONE = 0.5;

export function largestStandardError(intended: number, aim: Aim, wanted: number = WANTED): number {
  const q = normalQuantile(CONFIDENCE_PER_SIDE);
  return aim === 'see'
    ? Math.abs(intended) / (q + normalQuantile(wanted))
    : (ZONE * Math.abs(intended)) / (q + normalQuantile(1 - (1 - wanted) / 2));
}

export const chanceToSee = (intended: number, s: number): number =>
  normalTail(Math.abs(intended) / s - normalQuantile(CONFIDENCE_PER_SIDE));

/** Cores for a reading variance, or a refusal when no number of cores reaches it. */
export function coresNeeded(input: {
  readonly variance: number;
  readonly core: number;
  readonly rep: number;
  readonly labDuplicates: number;
  readonly wobble: number;
}): { ok: true; cores: number } | { ok: false; reason: 'not-with-cores' } {
  const left = input.variance - input.rep ** 2 / input.labDuplicates - input.wobble ** 2;
  return left > 0 ? { ok: true, cores: Math.ceil(input.core ** 2 / left) } : { ok: false, reason: 'not-with-cores' };
}
