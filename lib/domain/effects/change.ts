/**
 * The observed change D and its variance, for one plot with one or several before-tests.
 *
 * Without untreated plots: D = after - (m + rho (before - m)); the occasion's shift stays in the variance whatever the
 * number of cores. With untreated plots: analysis of covariance with the slope fixed at rho; the occasion's shift and the
 * site mean cancel (preferring this to plain differences: McKenzie 2012). rho = 1 gives the plain difference or the plain
 * difference in differences. `before` is the weighted mean of the before-tests, `beforeVariance` its own-error variance.
 * Units: the working scale. Checked against R in fixtures/tables.
 */
export type OwnReadings = {
  readonly after: number;
  readonly afterVariance: number;
  readonly before: number;
  readonly beforeVariance: number;
};

export type Change = { readonly D: number; readonly variance: number };

export type SiteMean = {
  readonly mean: number;
  readonly plots: number;
  readonly betweenPlots: number;
  readonly rho: number;
};

export function changeAlone(
  own: OwnReadings,
  site: SiteMean,
  shared: {
    readonly occasion: number;
    readonly beforeWeightsSquared: number;
    readonly season: number;
    readonly laboratory: number;
  },
): Change & { readonly siteMeanPart: number; readonly occasionPart: number } {
  const { rho, mean, betweenPlots, plots } = site;
  const siteMeanPart = rho === 1 ? 0 : ((1 - rho) ** 2 * (betweenPlots + own.beforeVariance)) / plots;
  const occasionPart = shared.occasion * (1 + shared.beforeWeightsSquared);
  return {
    D: own.after - (mean + rho * (own.before - mean)),
    variance:
      own.afterVariance + rho * own.beforeVariance + occasionPart + siteMeanPart + shared.season + shared.laboratory,
    siteMeanPart,
    occasionPart,
  };
}

const mean = (values: readonly number[]): number => values.reduce((sum, value) => sum + value, 0) / values.length;

export function changeAgainstControls(
  treated: readonly OwnReadings[],
  controls: readonly OwnReadings[],
  site: Pick<SiteMean, 'rho' | 'plots'>,
  spreadDf: number,
): Change & { readonly treatedPart: number; readonly controlPart: number; readonly reliabilityPart: number } {
  const { rho, plots } = site;
  const part = (rows: readonly OwnReadings[]): number =>
    mean(rows.map((row) => row.afterVariance + rho * row.beforeVariance)) / rows.length;
  const gap = mean(treated.map((row) => row.before)) - mean(controls.map((row) => row.before));
  const treatedPart = part(treated);
  const controlPart = part(controls);
  const reliabilityPart = (gap ** 2 * 2 * rho ** 2 * (1 - rho) ** 2) / (spreadDf + plots - 1);
  return {
    D: mean(treated.map((row) => row.after)) - mean(controls.map((row) => row.after)) - rho * gap,
    variance: treatedPart + controlPart + reliabilityPart,
    treatedPart,
    controlPart,
    reliabilityPart,
  };
}

/** Before-tests joined by weights; `variance` is 1 / sum of weights when the weights are inverse variances. */
export function joinByWeights(
  values: readonly number[],
  weights: readonly number[],
): { readonly value: number; readonly variance: number; readonly shares: readonly number[] } {
  const total = weights.reduce((sum, weight) => sum + weight, 0);
  const shares = weights.map((weight) => weight / total);
  return {
    value: shares.reduce((sum, share, index) => sum + share * (values[index] ?? 0), 0),
    variance: 1 / total,
    shares,
  };
}

/**
 * Change between two values of which one or both lie below a limit: each such value may be anything from 0 to its limit.
 * The estimate is the middle of the bounds, for display only; half the limit is never put in for a value.
 */
export function censoredChange(
  before: { readonly low: number; readonly high: number },
  after: { readonly low: number; readonly high: number },
  s: number,
  q: number,
): { readonly lo: number; readonly estimate: number; readonly hi: number } {
  return {
    lo: after.low - before.high - q * s,
    estimate: (after.low + after.high) / 2 - (before.low + before.high) / 2,
    hi: after.high - before.low + q * s,
  };
}
