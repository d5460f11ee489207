import { normalDensity, normalTail } from '../quantiles';
import { SPREAD_DF } from './noise-defaults';

/**
 * Regression to the mean: plots are treated because they read extreme, and part of an extreme reading is error, so the
 * next reading comes back by itself. The correction shrinks a before reading towards the site's mean of that day.
 *
 * Source: Barnett, van der Pols and Dobson, Int J Epidemiol 34:215-220, 2005. Valid when the plots were chosen on the before
 * reading alone and at least three plots were read that day; with one or two there is no mean to learn, so rho is 1.
 * Worked example: between-plot variance 0.09 and reading variance 0.0092 give rho 0.907.
 */
export const MIN_PLOTS_FOR_A_MEAN = 3;

/** True variance between plots: prior spread worth 4 degrees of freedom, joined with what the readings show beyond v. */
export const betweenPlotVariance = (input: {
  readonly readingsVariance: number;
  readonly readingVariance: number;
  readonly plots: number;
  readonly priorSpread: number;
}): number =>
  (SPREAD_DF * input.priorSpread ** 2 +
    (input.plots - 1) * Math.max(input.readingsVariance - input.readingVariance, 0)) /
  (SPREAD_DF + input.plots - 1);

/** Share of a reading's distance from the mean that is real. */
export const reliability = (betweenPlots: number, reading: number): number => betweenPlots / (betweenPlots + reading);

export const trueBefore = (reading: number, siteMean: number, rho: number): number =>
  siteMean + rho * (reading - siteMean);

/** Expected change without any cause when plots reading above `cut` are chosen (Davis 1976; Barnett et al. 2005). */
export function spuriousFall(siteMean: number, spread: number, readingVariance: number, cut: number): number {
  const total = Math.hypot(spread, Math.sqrt(readingVariance));
  const z = (cut - siteMean) / total;
  return ((readingVariance / total) * normalDensity(z)) / (1 - normalTail(z));
}
