import { censoredChange } from './change';
import type { UsedControl } from './controls';
import { satterthwaite, twoPartSd } from './error-model';
import type { SiteError } from './learn';
import { heaviest } from './reading';
import type { BeforeUsed, NoiseComponent, TestPoint } from './types';

/**
 * Values near or below what the laboratory can read, judged in their own unit instead of on logs.
 * Sd of a reading: a third of the reporting limit (our assumption), joined with the proportional part. A value below the
 * limit may be anything from 0 to it; half the limit is never substituted (Environ Sci Technol 42:3732-3738, 2008). No
 * correction for regression to the mean is made here, and only the heaviest before-test is used.
 */
const FLOOR_SHARE = 1 / 3;
const LOW_BELOW_FLOORS = 5;

const limitOf = (test: TestPoint): number | null => (test.qualifier === 'below' ? test.value : test.reportingLimit);

export function isLow(test: TestPoint): boolean {
  if (test.qualifier === 'below') return true;
  return test.reportingLimit !== null && test.value < LOW_BELOW_FLOORS * FLOOR_SHARE * test.reportingLimit;
}

const bounds = (test: TestPoint) => ({ low: test.qualifier === 'below' ? 0 : test.value, high: test.value });

export type LowEstimate = {
  readonly variance: number;
  readonly nu: number;
  readonly censored: boolean;
  readonly before: TestPoint;
  readonly components: readonly NoiseComponent[];
  /** Interval of the change for a given q, in the analyte's unit. */
  readonly interval: (q: number) => { readonly lo: number; readonly estimate: number; readonly hi: number };
};

const ownVariance = (error: SiteError, test: TestPoint, limit: number): number =>
  twoPartSd(test.value, FLOOR_SHARE * limit, Math.sqrt(error.varianceOf(test))) ** 2;

export function lowEstimate(
  error: SiteError,
  befores: readonly BeforeUsed[],
  after: TestPoint,
  controls: readonly UsedControl[],
): LowEstimate | null {
  const row = heaviest(befores);
  if (row === undefined) return null;
  const before = row.test;
  const limit = Math.max(limitOf(before) ?? 0, limitOf(after) ?? 0);
  const largest = Math.max(before.value, after.value);
  const own = ownVariance(error, before, limit) + ownVariance(error, after, limit);
  const alone = controls.length === 0;
  const occasion = alone ? error.occasion.variance * (before.value ** 2 + after.value ** 2) : 0;
  const seasonSd = error.noise.season === 'refuse' ? 0 : error.noise.season;
  const season = alone && !row.sameSeason ? (seasonSd * largest) ** 2 : 0;
  const laboratory = alone && !row.sameLaboratory ? (error.noise.laboratory * largest) ** 2 : 0;
  const steps = controls.flatMap((control) => {
    const start = control.befores.find(({ test }) => test.day === before.day)?.test;
    return start === undefined ? [] : [{ start, end: control.after }];
  });
  const shift = steps.reduce((sum, { start, end }) => sum + (end.value - start.value), 0) / Math.max(steps.length, 1);
  const controlVariance =
    steps.reduce((sum, { start, end }) => sum + ownVariance(error, start, limit) + ownVariance(error, end, limit), 0) /
    Math.max(steps.length, 1) ** 2;
  const all: NoiseComponent[] = [
    { key: 'plot-after', variance: ownVariance(error, after, limit), df: error.plot.df, learnt: error.plot.learnt },
    { key: 'plot-before', variance: ownVariance(error, before, limit), df: error.plot.df, learnt: error.plot.learnt },
    { key: 'controls', variance: controlVariance, df: error.plot.df, learnt: error.plot.learnt },
    { key: 'occasion', variance: occasion, df: error.occasion.df, learnt: error.occasion.learnt },
    { key: 'season', variance: season, df: 8, learnt: false },
    { key: 'laboratory', variance: laboratory, df: 8, learnt: false },
  ];
  const components = all.filter((component) => component.variance > 0);
  const variance = components.reduce((sum, component) => sum + component.variance, 0);
  const shared = components.filter((component) => !/^(plot|controls)/.test(component.key));
  return {
    variance,
    nu: satterthwaite([{ variance: own + controlVariance, df: error.plot.df }, ...shared]),
    censored: before.qualifier === 'below' || after.qualifier === 'below',
    before,
    components,
    interval: (q) => {
      const raw = censoredChange(bounds(before), bounds(after), Math.sqrt(variance), q);
      return { lo: raw.lo - shift, estimate: raw.estimate - shift, hi: raw.hi - shift };
    },
  };
}
