import { addDays, civil, type Day, dayNumber, dayOfYear } from '../days';

/**
 * Seasons, the yearly circle and warm months.
 *
 * Same season: two days at most 45 apart on the circle of the year (so 20 December and 10 January are 21 apart).
 * Warm month: 30 days with the soil at or above 13 C (55 F), counted from a site's twelve monthly flags. The threshold is
 * the one below which elemental sulfur does next to nothing (Ohio State University Extension AGF-507, as quoted by a
 * consultant: a weak source); the default flags (April to October north, October to April south) are our assumption.
 */
export type Hemisphere = 'north' | 'south';
export type Season = 'spring' | 'summer' | 'fall' | 'winter';
export type WarmMonths = readonly boolean[];

export const SAME_SEASON_DAYS = 45;
export const DAYS_OF_A_WARM_MONTH = 30;

const NORTH: readonly Season[] = ['winter', 'spring', 'summer', 'fall'];
const SOUTH: readonly Season[] = ['summer', 'fall', 'winter', 'spring'];

/** Meteorological seasons: three whole months each, from March; the south is half a year on. For words only. */
export function seasonOf(day: Day, hemisphere: Hemisphere): Season {
  const quarter = Math.floor((civil(day).month % 12) / 3);
  return (hemisphere === 'north' ? NORTH : SOUTH)[quarter] ?? 'winter';
}

/** Distance of two days of the year on the circle of 365. */
export function circularGap(a: number, b: number): number {
  const gap = Math.abs(a - b) % 365;
  return Math.min(gap, 365 - gap);
}

export const seasonGap = (a: Day, b: Day): number => circularGap(dayOfYear(a), dayOfYear(b));

export const isSameSeason = (a: Day, b: Day): boolean => seasonGap(a, b) <= SAME_SEASON_DAYS;

/** January first. */
export function defaultWarmMonths(hemisphere: Hemisphere): WarmMonths {
  const north = [false, false, false, true, true, true, true, true, true, true, false, false];
  return hemisphere === 'north' ? north : [...north.slice(6), ...north.slice(0, 6)];
}

const isWarm = (day: Day, flags: WarmMonths): boolean => flags[civil(day).month - 1] === true;

/** Warm months that passed from the day after `from` to `to`, both of them warm days counted singly. Never negative. */
export function warmMonthsBetween(from: Day, to: Day, flags: WarmMonths): number {
  let warm = 0;
  for (let number = dayNumber(from) + 1; number <= dayNumber(to); number += 1) {
    if (isWarm(addDays(from, number - dayNumber(from)), flags)) warm += 1;
  }
  return warm / DAYS_OF_A_WARM_MONTH;
}

/** First day on which `wanted` warm months have passed, at most `withinDays` after `from`. */
export function dayAfterWarmMonths(
  from: Day,
  wanted: number,
  flags: WarmMonths,
  withinDays: number,
): { ok: true; day: Day } | { ok: false; reason: 'never-warm-enough' } {
  const needed = Math.ceil(wanted * DAYS_OF_A_WARM_MONTH - 1e-9);
  let warm = 0;
  for (let step = 0; step <= withinDays; step += 1) {
    const day = addDays(from, step);
    if (step > 0 && isWarm(day, flags)) warm += 1;
    if (warm >= needed) return { ok: true, day };
  }
  return { ok: false, reason: 'never-warm-enough' };
}
