import { type AnalyteKey, analyte } from '../analytes';
import { addDays, addMonths, type Day, dayInWords, dayNumber, daysBetween } from '../days';
import { learnSiteError, onWorkingScale, type SiteError } from '../effects/learn';
import type { SiteNoise, TestPoint } from '../effects/types';
import { speakerFor } from '../effects/words';
import { tQuantile } from '../quantiles';
import { type DriftBreak, mainSeason, splitRuns } from './breaks';
import { crossing, joinByPrecision, type Line, weightedLine } from './line';
import { readingRange } from './range';
import { type SenSlope, theilSen } from './theil-sen';

export type { DriftBreak } from './breaks';
export { readingRange } from './range';
export type { SenSlope } from './theil-sen';

/**
 * How one analyte of one plot moves by itself, year by year, and when it would leave its band.
 *
 * Method: a weighted line through tests of one method, depth, laboratory and season, with a step at the first test after each
 * application; beside it the Theil-Sen slope, which no single odd year can turn. Fewer than four tests, or fewer than two more
 * than the line has parameters, give no trend; two slopes of opposite sign give none either. The day of leaving the band and
 * its 80 % interval by inverse prediction (Fieller 1954), as for shelf lives in ISO Guide 35. Concentrations on natural logs.
 * Prior drift of pH: -0.03 +/- 0.05 a year (a Chinese ten-site thesis gives -0.046 with NPK; Ge, Zhu and Jiang, -0.037 in an
 * apple orchard); with hard water or free lime 0 +/- 0.05 (assumption). It is shown, never subtracted.
 */
export const FEWEST_TESTS = 4;
const EXTRA_TESTS = 2;
const PRIOR_DF = 8;
const YEAR = 365.25;
const PER_SIDE = 0.95;
const FORECAST_SIDE = 0.9;
const RETEST_MONTHS = 36;

export type DriftInput = {
  readonly analyte: AnalyteKey;
  readonly tests: readonly TestPoint[];
  /** Applications that act on the analyte. */
  readonly applications: readonly { readonly day: Day; readonly label: string }[];
  readonly noise: SiteNoise;
  readonly target?: { readonly low?: number; readonly high?: number };
  readonly hardWaterOrFreeLime: boolean;
};

export type DriftPoint = {
  readonly test: TestPoint;
  readonly range: { readonly low: number; readonly high: number } | null;
  /** Which unbroken part it belongs to, from 0. */
  readonly run: number;
  readonly inTrend: boolean;
};

export type Trend =
  | {
      readonly ok: true;
      /** A year: pH units, or the natural log of the ratio. */
      readonly perYear: number;
      readonly lo: number;
      readonly hi: number;
      readonly se: number;
      readonly df: number;
      readonly tests: number;
      readonly steps: number;
      /** Only without steps. */
      readonly sen: SenSlope | null;
      readonly sentence: string;
    }
  | {
      readonly ok: false;
      readonly reason: 'too-few-tests' | 'slopes-disagree' | 'no-noise-figure';
      readonly sentence: string;
    };

export type Forecast =
  | {
      readonly ok: true;
      readonly day: Day;
      readonly from: Day;
      readonly until: Day;
      readonly edge: number;
      readonly rough: boolean;
      readonly retestBy: Day;
      readonly sentence: string;
    }
  | {
      readonly ok: false;
      readonly reason: 'no-trend' | 'no-band' | 'outside-already' | 'slope-not-settled' | 'too-far';
      readonly sentence: string;
    };

export type DriftView = {
  readonly points: readonly DriftPoint[];
  readonly breaks: readonly DriftBreak[];
  readonly trend: Trend;
  readonly forecast: Forecast;
  /** pH only: what to expect a year, from the prior and, with three tests or more, the plot's own line. */
  readonly expected: { readonly perYear: number; readonly sd: number; readonly joined: boolean } | null;
};

const earlierOf = (a: Day, b: Day): Day => (daysBetween(a, b) >= 0 ? a : b);
const yearsOf = (day: Day): number => dayNumber(day) / YEAR;

/** One step for each first test after spreading; a product with no test before or after it teaches nothing here. */
function stepTimes(tests: readonly TestPoint[], applications: DriftInput['applications']): readonly number[] {
  const times = new Set<number>();
  for (const { day } of applications) {
    const next = tests.find((test) => test.day > day);
    if (next !== undefined && tests.some((test) => test.day <= day)) times.add(yearsOf(next.day));
  }
  return [...times].sort((a, b) => a - b);
}

function lineThrough(error: SiteError, tests: readonly TestPoint[], steps: readonly number[]) {
  const points = tests.map((test) => ({
    t: yearsOf(test.day),
    y: onWorkingScale(error.noise, test.value),
    variance: error.varianceOf(test) + error.occasion.variance,
  }));
  return { points, fitted: weightedLine(points, steps) };
}

function trendSentence(input: DriftInput, perYear: number, lo: number, hi: number, tests: number): string {
  const speaker = speakerFor(input.analyte, input.tests[0]?.unit ?? analyte(input.analyte).unit);
  const settled = lo > 0 || hi < 0;
  const isPh = speaker.name === 'pH';
  const size = (value: number): string =>
    isPh ? Math.abs(value).toFixed(2) : `${Math.abs(100 * Math.expm1(value)).toFixed(0)} %`;
  const way = perYear < 0 ? 'falls' : 'rises';
  const [near, far] = perYear < 0 ? [-hi, -lo] : [lo, hi];
  return settled
    ? `${speaker.name} ${way} by ${size(perYear)} a year (${size(near)} to ${size(far)}, ${tests} tests).`
    : `No drift of ${speaker.name} is seen in ${tests} tests: anything from ${lo < 0 ? '-' : '+'}${size(lo)} to ${hi < 0 ? '-' : '+'}${size(hi)} a year fits.`;
}

function forecastOf(input: DriftInput, error: SiteError, line: Line, last: TestPoint): Forecast {
  const { target } = input;
  const edge = line.slope < 0 ? target?.low : target?.high;
  if (edge === undefined)
    return {
      ok: false,
      reason: 'no-band',
      sentence: 'No band is chosen on the side it drifts to, so there is no day to name.',
    };
  const w = (value: number): number => onWorkingScale(error.noise, value);
  const now = line.level + line.slope * (yearsOf(last.day) - line.origin);
  if (line.slope < 0 ? now <= w(edge) : now >= w(edge)) {
    return { ok: false, reason: 'outside-already', sentence: 'By the line it has left the band already.' };
  }
  const { t, interval } = crossing(line, w(edge), tQuantile(FORECAST_SIDE, PRIOR_DF + line.tests - line.parameters));
  if (interval === null) {
    return {
      ok: false,
      reason: 'slope-not-settled',
      sentence: 'No date can be given yet: the slope is not settled. Keep the ordinary interval between samples.',
    };
  }
  const day = (years: number): Day => addDays(last.day, Math.round((years - yearsOf(last.day)) * YEAR));
  if (interval.until - yearsOf(last.day) > 200)
    return {
      ok: false,
      reason: 'too-far',
      sentence: 'At this pace it stays in the band for longer than a forecast can say.',
    };
  const earliest = day(interval.from);
  const ordinary = addMonths(last.day, RETEST_MONTHS);
  const soonest = earlierOf(earliest, ordinary);
  const rough = line.tests <= FEWEST_TESTS;
  return {
    ok: true,
    day: day(t),
    from: earliest,
    until: day(interval.until),
    edge,
    rough,
    retestBy: daysBetween(last.day, soonest) < 0 ? last.day : soonest,
    sentence: `It reaches ${edge} about ${dayInWords(day(t))} (${dayInWords(earliest)} to ${dayInWords(day(interval.until))})${rough ? ', a rough date from few tests' : ''}.`,
  };
}

function expectedDrift(input: DriftInput, line: Line | null, steps: number): DriftView['expected'] {
  if (input.analyte !== 'soil_ph_water' && input.analyte !== 'soil_ph_salt') return null;
  const prior = { mean: input.hardWaterOrFreeLime ? 0 : -0.03, sd: 0.05 };
  if (line === null || line.tests < 3 || steps > 0) return { perYear: prior.mean, sd: prior.sd, joined: false };
  const both = joinByPrecision(prior, { mean: line.slope, sd: line.slopeSe });
  return { perYear: both.mean, sd: both.sd, joined: true };
}

const noForecast = (sentence: string): Forecast => ({ ok: false, reason: 'no-trend', sentence });

export function driftOf(input: DriftInput): DriftView {
  const sorted = input.tests
    .filter((test) => test.analyte === input.analyte && test.confirmed)
    .toSorted((a, b) => daysBetween(b.day, a.day) || (a.resultId < b.resultId ? -1 : 1));
  const { runs, breaks } = splitRuns(sorted);
  const learnt = learnSiteError(input.analyte, input.noise);
  const last = mainSeason(runs.at(-1) ?? []);
  const usable = learnt.ok
    ? last.filter((test) => test.qualifier === 'exact' && (learnt.error.noise.scale === 'additive' || test.value > 0))
    : [];
  const points = runs.flatMap((run, index) =>
    run.map((test) => ({ test, range: readingRange(test, input.noise), run: index, inTrend: usable.includes(test) })),
  );
  const answer = (trend: Trend, forecast: Forecast, expected: DriftView['expected']): DriftView => ({
    points,
    breaks,
    trend,
    forecast,
    expected,
  });
  if (!learnt.ok) {
    const sentence = 'No published figure says how far two tests of it differ by themselves, so no trend is stated.';
    return answer({ ok: false, reason: 'no-noise-figure', sentence }, noForecast(sentence), null);
  }
  const { error } = learnt;
  const steps = stepTimes(usable, input.applications);
  const { points: xy, fitted } = lineThrough(error, usable, steps);
  const line = fitted.ok ? fitted.line : null;
  const expected = expectedDrift(input, line, steps.length);
  const newest = usable.at(-1);
  const needed = Math.max(FEWEST_TESTS, 2 + steps.length + EXTRA_TESTS);
  if (line === null || newest === undefined || usable.length < needed) {
    const sentence = `No trend yet: that takes ${needed} tests of one method, depth, laboratory and season${steps.length > 0 ? ' with this many applications in between' : ''}; there ${usable.length === 1 ? 'is' : 'are'} ${usable.length}.`;
    return answer({ ok: false, reason: 'too-few-tests', sentence }, noForecast(sentence), expected);
  }
  const sen = steps.length === 0 ? theilSen(xy) : null;
  if (sen !== null && sen.slope * line.slope < 0) {
    const sentence = 'No trend is stated: the straight line and the middle of all slopes point in opposite directions.';
    return answer({ ok: false, reason: 'slopes-disagree', sentence }, noForecast(sentence), expected);
  }
  const df = PRIOR_DF + line.tests - line.parameters;
  const reach = tQuantile(PER_SIDE, df) * line.slopeSe;
  const [lo, hi] = [line.slope - reach, line.slope + reach];
  const sentence = trendSentence(input, line.slope, lo, hi, line.tests);
  const trend: Trend = {
    ok: true,
    perYear: line.slope,
    lo,
    hi,
    se: line.slopeSe,
    df,
    tests: line.tests,
    steps: steps.length,
    sen,
    sentence,
  };
  return answer(trend, forecastOf(input, error, line, newest), expected);
}
