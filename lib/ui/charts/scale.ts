import { dayMs, isoDay } from './numbers';
import type { ChartAnalyte, DriftAmendment, DriftPoint, TargetBand } from './types';

export interface Axis {
  readonly min: number;
  readonly max: number;
  readonly ticks: readonly number[];
}

const PH_LEAST_SPAN = 1;
const clean = (value: number): number => Number(value.toFixed(10));

/** The 1-2-5 step that cuts a span into about `wanted` parts. */
export function niceStep(span: number, wanted: number): number {
  const rough = span / Math.max(1, wanted);
  const power = 10 ** Math.floor(Math.log10(rough));
  const part = rough / power - 1e-9;
  return (part <= 1 ? 1 : part <= 2 ? 2 : part <= 5 ? 5 : 10) * power;
}

/** pH is read in tenths: 0.2 up to a span of 1.6, then 0.5, and whole units only for a very tall axis. */
export function phStep(span: number): number {
  if (span <= 1.6 + 1e-9) return 0.2;
  return span <= 5 + 1e-9 ? 0.5 : 1;
}

function ticksBetween(min: number, max: number, step: number): number[] {
  const count = Math.round((max - min) / step);
  return Array.from({ length: count + 1 }, (_, i) => clean(min + i * step));
}

/**
 * The value axis: all values, their ranges and the target band fit, ends lie on ticks.
 * pH never starts at zero and never shows less than one unit, so that a tenth does not look like a cliff.
 */
export function valueAxis(
  points: readonly DriftPoint[],
  band: TargetBand | null,
  analyte: ChartAnalyte,
  wanted = 5,
): Axis {
  const values = points.flatMap((p) => (p.qualifier === 'below-unknown' ? [] : [p.value, p.low, p.high]));
  const all = [...values, band?.low, band?.high].filter(
    (v): v is number => typeof v === 'number' && Number.isFinite(v),
  );
  if (all.length === 0) {
    return analyte.isPh ? { min: 5, max: 8, ticks: ticksBetween(5, 8, 0.5) } : { min: 0, max: 1, ticks: [0, 0.5, 1] };
  }
  let low = Math.min(...all);
  let high = Math.max(...all);
  const least = analyte.isPh ? PH_LEAST_SPAN : Math.max(Math.abs(high) * 0.2, 10 ** -analyte.decimals * 4);
  if (high - low < least) {
    const middle = (low + high) / 2;
    low = middle - least / 2;
    high = middle + least / 2;
  }
  const step = analyte.isPh ? phStep(high - low) : niceStep(high - low, wanted);
  let min = clean(Math.floor(low / step + 1e-9) * step);
  const max = clean(Math.ceil(high / step - 1e-9) * step);
  if (!analyte.isPh && Math.min(...all) >= 0) min = Math.max(0, min);
  return { min, max, ticks: ticksBetween(min, max, step) };
}

const MONTH_STEPS = [1, 2, 3, 6, 12, 24, 60, 120] as const;

/** First days of months, at the closest spacing that gives at most `most` ticks. */
export function timeTicks(
  fromMs: number,
  toMs: number,
  most: number,
): { readonly ticks: number[]; readonly months: number } {
  for (const months of MONTH_STEPS) {
    const ticks = monthStarts(fromMs, toMs, months);
    if (ticks.length <= most) return { ticks, months };
  }
  return { ticks: [], months: 120 };
}

function monthStarts(fromMs: number, toMs: number, step: number): number[] {
  const start = new Date(fromMs);
  const ticks: number[] = [];
  let index = start.getUTCFullYear() * 12 + start.getUTCMonth();
  index = Math.ceil(index / step) * step;
  for (;;) {
    const at = Date.UTC(Math.floor(index / 12), index % 12, 1);
    if (at > toMs) return ticks;
    if (at >= fromMs) ticks.push(at);
    index += step;
  }
}

/** Years alone when every tick is a January, else month and year. */
export function timeTickLabel(ms: number, months: number, locale = 'en-GB'): string {
  if (months >= 12) return isoDay(ms).slice(0, 4);
  return new Intl.DateTimeFormat(locale, { month: 'short', year: 'numeric', timeZone: 'UTC' }).format(new Date(ms));
}

/** From the first test or amendment to the day the chart is drawn for, with a little air at the left. */
export function timeSpan(
  points: readonly DriftPoint[],
  amendments: readonly DriftAmendment[],
  asOf: string,
): { readonly fromMs: number; readonly toMs: number } {
  const days = [...points.map((p) => dayMs(p.takenOn)), ...amendments.map((a) => dayMs(a.on))];
  const toMs = Math.max(dayMs(asOf), ...days);
  const first = days.length === 0 ? toMs : Math.min(...days);
  const span = Math.max(toMs - first, 240 * 86_400_000);
  return { fromMs: toMs - span - Math.round(span * 0.05), toMs };
}

/** Where a value lies on an axis, 0 to 1. */
export function share(value: number, min: number, max: number): number {
  return max === min ? 0.5 : (value - min) / (max - min);
}
