import { addDays, type Day, daysBetween } from '../days';
import { normalQuantile, normalTail } from '../quantiles';
import { DAYS_OF_A_WARM_MONTH, dayAfterWarmMonths, type WarmMonths, warmMonthsBetween } from '../sampling';
import type { Intent, ReactionKind } from './types';

/**
 * How much of the intended change can have happened by a day.
 *
 * Sulfur: half after 3 warm months, 0.75 after 6, 0.9 after 12; lime 0.4, 0.65, 0.85 (assumptions, set against 39-75 % of
 * fine sulfur oxidised in 70 days at 30 C in ten Iowa soils); soluble salts all after four weeks. Straight lines between,
 * nothing on the first day, flat after twelve warm months.
 */
const CURVES: Readonly<Record<'sulfur' | 'lime', readonly (readonly [number, number])[]>> = {
  sulfur: [
    [0, 0],
    [3, 0.5],
    [6, 0.75],
    [12, 0.9],
  ],
  lime: [
    [0, 0],
    [3, 0.4],
    [6, 0.65],
    [12, 0.85],
  ],
};
const SALT_DAYS = 28;
export const ENOUGH_REACTED = 0.5;

export function reactedShareAfter(kind: 'sulfur' | 'lime', warmMonths: number): number {
  const curve = CURVES[kind];
  let [fromMonth, fromShare] = [0, 0];
  for (const [month, share] of curve) {
    if (warmMonths <= month) {
      const width = month - fromMonth;
      return width === 0 ? share : fromShare + ((share - fromShare) * (warmMonths - fromMonth)) / width;
    }
    [fromMonth, fromShare] = [month, share];
  }
  return fromShare;
}

export function reactedShare(kind: ReactionKind, appliedOn: Day, on: Day, flags: WarmMonths): number {
  if (kind === 'soluble-salt') return daysBetween(appliedOn, on) >= SALT_DAYS ? 1 : 0;
  return reactedShareAfter(kind, warmMonthsBetween(appliedOn, on, flags));
}

/** First day on which half has reacted: 3 warm months for sulfur, 4.2 for lime. */
export function dayHalfReacted(kind: ReactionKind, appliedOn: Day, flags: WarmMonths, withinDays: number) {
  if (kind === 'soluble-salt') return { ok: true, day: addDays(appliedOn, SALT_DAYS) } as const;
  const step = 1 / DAYS_OF_A_WARM_MONTH;
  let months = 0;
  while (reactedShareAfter(kind, months) < ENOUGH_REACTED - 1e-9) months += step;
  return dayAfterWarmMonths(appliedOn, months, flags, withinDays);
}

export type IntendedNow = {
  /** By the day asked: what was spread, times the share that has reacted. */
  readonly byThen: number;
  /** What the plan said in full. */
  readonly planned: number;
  /** Share of the spread amount's effect that can have happened. */
  readonly share: number;
};

export function intendedBy(intents: readonly Intent[], on: Day, flags: WarmMonths): IntendedNow {
  let [byThen, planned, spread] = [0, 0, 0];
  for (const intent of intents) {
    const really = intent.fullChange * (intent.spreadAmount / intent.plannedAmount);
    byThen += really * reactedShare(intent.reaction, intent.appliedOn, on, flags);
    planned += intent.fullChange;
    spread += really;
  }
  return { byThen, planned, share: spread === 0 ? 0 : byThen / spread };
}

/** Log-sds of amount, analysis, depth and density, response, reaction (assumptions); together 0.50. */
export const PLAN_LOG_SDS = [0.1, 0.04, 0.12, 0.4, 0.25] as const;
export const planLogSd = (sds: readonly number[] = PLAN_LOG_SDS): number => Math.hypot(...sds);

/** Range that holds the result of a plan eight times in ten, or as often as `share` says. */
export function planRange(intended: number, sds: readonly number[] = PLAN_LOG_SDS, share = 0.8) {
  const reach = normalQuantile(1 - (1 - share) / 2) * planLogSd(sds);
  return { low: intended * Math.exp(-reach), high: intended * Math.exp(reach) };
}

/** Two-sided p that what was seen and what was intended agree, given the sd of each. */
export const agreement = (D: number, s: number, intended: number, intendedSd: number): number =>
  2 * normalTail(-Math.abs(D - intended) / Math.hypot(s, intendedSd));
