import { daysBetween } from '../days';
import { isSameSeason } from '../sampling';
import { changeAgainstControls, changeAlone, type OwnReadings, type SiteMean } from './change';
import { comparable, sameLaboratory } from './comparable';
import { satterthwaite } from './error-model';
import { onWorkingScale, type SiteError } from './learn';
import { SPREAD_DF } from './noise-defaults';
import { betweenPlotVariance, MIN_PLOTS_FOR_A_MEAN, reliability } from './regression';
import type { BeforeUsed, EffectInput, NoiseComponent, TestPoint } from './types';

/**
 * From chosen tests to D, s and degrees of freedom on the working scale (pH units or natural logs).
 * Before-tests are joined with weights 1 / (v + occasion + season + laboratory + (0.05 x years)^2).
 */
const DRIFT_ALLOWANCE = 0.05;
const DAYS_A_YEAR = 365.25;

export type Estimate = {
  readonly D: number;
  readonly variance: number;
  readonly nu: number;
  readonly site: SiteMean;
  readonly rawBefore: number;
  readonly correctedBefore: number;
  readonly components: readonly NoiseComponent[];
};

export function weighBefores(
  error: SiteError,
  befores: readonly TestPoint[],
  after: TestPoint,
  spreadOn: EffectInput['today'],
): readonly BeforeUsed[] {
  const { noise } = error;
  const rows = befores.map((test) => {
    const sameSeason = isSameSeason(test.day, after.day);
    const sameLab = sameLaboratory(test, after);
    const season = sameSeason || noise.season === 'refuse' ? 0 : noise.season ** 2;
    const laboratory = sameLab ? 0 : noise.laboratory ** 2;
    const years = daysBetween(test.day, spreadOn) / DAYS_A_YEAR;
    const variance =
      error.varianceOf(test) + error.occasion.variance + season + laboratory + (DRIFT_ALLOWANCE * years) ** 2;
    return { test, weight: 1 / variance, sameSeason, sameLaboratory: sameLab };
  });
  const total = rows.reduce((sum, row) => sum + row.weight, 0);
  return rows.map((row) => ({ ...row, weight: row.weight / total }));
}

export const heaviest = (befores: readonly BeforeUsed[]): BeforeUsed | undefined =>
  befores.reduce<BeforeUsed | undefined>(
    (best, row) => (best === undefined || row.weight > best.weight ? row : best),
    undefined,
  );

/** Readings of all plots on the before day, one a plot, on the working scale. */
export function roundReadings(error: SiteError, siteTests: readonly TestPoint[], before: TestPoint): readonly number[] {
  const byPlot = new Map<string, number[]>();
  for (const test of [before, ...siteTests.filter((other) => other.resultId !== before.resultId)]) {
    const fits =
      test.day === before.day &&
      test.analyte === before.analyte &&
      test.qualifier === 'exact' &&
      sameLaboratory(test, before);
    if (!fits || !comparable(test, before).ok || (error.noise.scale === 'log' && test.value <= 0)) continue;
    if (test.plotId === before.plotId && test.resultId !== before.resultId) continue;
    const values = byPlot.get(test.plotId) ?? [];
    byPlot.set(test.plotId, [...values, onWorkingScale(error.noise, test.value)]);
  }
  return [...byPlot.values()].map((values) => values.reduce((sum, value) => sum + value, 0) / values.length);
}

export function siteMeanOf(
  error: SiteError,
  readings: readonly number[],
  before: TestPoint,
  beforeVariance: number,
): SiteMean {
  const plots = readings.length;
  const mean = readings.reduce((sum, value) => sum + value, 0) / Math.max(plots, 1);
  if (plots < MIN_PLOTS_FOR_A_MEAN) return { mean, plots, betweenPlots: 0, rho: 1 };
  const readingsVariance = readings.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (plots - 1);
  const betweenPlots = betweenPlotVariance({
    readingsVariance,
    readingVariance: error.varianceOf(before),
    plots,
    priorSpread: error.noise.spread,
  });
  return { mean, plots, betweenPlots, rho: reliability(betweenPlots, beforeVariance) };
}

export function ownReadings(error: SiteError, befores: readonly BeforeUsed[], after: TestPoint): OwnReadings {
  const value = (test: TestPoint): number => onWorkingScale(error.noise, test.value);
  return {
    after: value(after),
    afterVariance: error.varianceOf(after),
    before: befores.reduce((sum, row) => sum + row.weight * value(row.test), 0),
    beforeVariance: befores.reduce((sum, row) => sum + row.weight ** 2 * error.varianceOf(row.test), 0),
  };
}

/** Weight of the before-tests that differ from the after-test in season, and in laboratory. */
export const weightOf = (befores: readonly BeforeUsed[], differs: (row: BeforeUsed) => boolean): number =>
  befores.reduce((sum, row) => sum + (differs(row) ? row.weight : 0), 0);

export function estimateAlone(
  error: SiteError,
  befores: readonly BeforeUsed[],
  after: TestPoint,
  siteTests: readonly TestPoint[],
  drift: EffectInput['drift'],
): Estimate {
  const own = ownReadings(error, befores, after);
  const main = heaviest(befores)?.test ?? after;
  const site = siteMeanOf(error, roundReadings(error, siteTests, main), main, own.beforeVariance);
  const { noise, plot, occasion } = error;
  const seasonSd = noise.season === 'refuse' ? 0 : noise.season;
  const season = (seasonSd * weightOf(befores, (row) => !row.sameSeason)) ** 2;
  const laboratory = (noise.laboratory * weightOf(befores, (row) => !row.sameLaboratory)) ** 2;
  const squares = befores.reduce((sum, row) => sum + row.weight ** 2, 0);
  const change = changeAlone(own, site, {
    occasion: occasion.variance,
    beforeWeightsSquared: squares,
    season,
    laboratory,
  });
  const years = befores.reduce(
    (sum, row) => sum + (row.weight * daysBetween(row.test.day, after.day)) / DAYS_A_YEAR,
    0,
  );
  const known = drift !== undefined && drift.tests >= 4 ? drift : undefined;
  const driftPart = known ? (years * known.sd) ** 2 : 0;
  const parts = [
    { variance: own.afterVariance + own.beforeVariance, df: plot.df },
    { variance: change.occasionPart, df: occasion.df },
    ...(season > 0 ? [{ variance: season, df: 8 }] : []),
    ...(laboratory > 0 ? [{ variance: laboratory, df: 8 }] : []),
    ...(known && driftPart > 0 ? [{ variance: driftPart, df: known.df }] : []),
  ];
  const row = (key: NoiseComponent['key'], variance: number, df: number, learnt: boolean): NoiseComponent => ({
    key,
    variance,
    df,
    learnt,
  });
  const components: NoiseComponent[] = [
    row('plot-after', own.afterVariance, plot.df, plot.learnt),
    row('plot-before', site.rho * own.beforeVariance, plot.df, plot.learnt),
    row('occasion', change.occasionPart, occasion.df, occasion.learnt),
    row('season', season, 8, false),
    row('laboratory', laboratory, 8, false),
    row('site-mean', change.siteMeanPart, SPREAD_DF + Math.max(site.plots - 1, 0), true),
    row('drift', driftPart, known?.df ?? 8, true),
  ];
  return {
    D: change.D - (known ? known.perYear * years : 0),
    variance: change.variance + driftPart,
    nu: satterthwaite(parts),
    site,
    rawBefore: own.before,
    correctedBefore: site.mean + site.rho * (own.before - site.mean),
    components: components.filter((component) => component.variance > 0),
  };
}

export function estimateAgainst(
  error: SiteError,
  befores: readonly BeforeUsed[],
  after: TestPoint,
  controls: readonly OwnReadings[],
  siteTests: readonly TestPoint[],
): Estimate {
  const own = ownReadings(error, befores, after);
  const main = heaviest(befores)?.test ?? after;
  const site = siteMeanOf(error, roundReadings(error, siteTests, main), main, own.beforeVariance);
  const change = changeAgainstControls([own], controls, site, SPREAD_DF);
  const { df, learnt } = error.plot;
  const components: NoiseComponent[] = [
    { key: 'plot-after', variance: own.afterVariance, df, learnt },
    { key: 'plot-before', variance: site.rho * own.beforeVariance, df, learnt },
    { key: 'controls', variance: change.controlPart, df, learnt },
    { key: 'reliability', variance: change.reliabilityPart, df: SPREAD_DF + Math.max(site.plots - 1, 0), learnt: true },
  ];
  return {
    D: change.D,
    variance: change.variance,
    nu: df,
    site,
    rawBefore: own.before,
    correctedBefore: site.mean + site.rho * (own.before - site.mean),
    components: components.filter((component) => component.variance > 0),
  };
}
