import { normalQuantile } from '../quantiles';

/**
 * The arithmetic of the error model: how sure one reading is, and what a site's own duplicates do to that.
 * All sds are on the working scale (pH units, or natural logs for concentrations). Checked against fixtures/tables
 * (R 4.2.2). Sources: scaled inverse chi-square update as in Smyth, Stat Appl Genet Mol Biol 3(1) art. 3 (2004);
 * Welch-Satterthwaite degrees of freedom; reference change value of Harris and Yasaka, Clin Chem 29:25-30 (1983).
 */
export type VarianceEstimate = { readonly variance: number; readonly df: number };

export type ReadingDesign = {
  readonly core: number;
  readonly cores: number;
  readonly rep: number;
  readonly labDuplicates?: number;
  readonly wobble?: number;
  readonly printedStep?: number;
};

/**
 * Variance of one composite's own error: core-to-core variance shared by the cores, the laboratory's on the same bag
 * shared by its duplicates, short-lived change of the plot, and rounding (step squared / 12).
 * Worked example: core 0.25 over 15 cores, laboratory 0.05, wobble 0.05 gives 0.00917.
 */
export const readingVariance = (design: ReadingDesign): number =>
  design.core ** 2 / design.cores +
  design.rep ** 2 / (design.labDuplicates ?? 1) +
  (design.wobble ?? 0) ** 2 +
  (design.printedStep ?? 0) ** 2 / 12;

/** Prior variance worth `df`, joined with a sum of squares of `more` degrees of freedom. */
export const updateVariance = (prior: VarianceEstimate, sumOfSquares: number, more: number): VarianceEstimate => ({
  variance: (prior.df * prior.variance + sumOfSquares) / (prior.df + more),
  df: prior.df + more,
});

/** Sum of squares of duplicate differences, half of d squared each; its degrees of freedom are the number of pairs. */
export const duplicateSumOfSquares = (differences: readonly number[]): number =>
  differences.reduce((sum, difference) => sum + difference ** 2 / 2, 0);

/** Degrees of freedom of a sum of variances that are known with `df` each. */
export function satterthwaite(parts: readonly VarianceEstimate[]): number {
  const total = parts.reduce((sum, part) => sum + part.variance, 0);
  return total ** 2 / parts.reduce((sum, part) => sum + part.variance ** 2 / part.df, 0);
}

/** Log-scale sd of a coefficient of variation, and back. */
export const logSdOfCv = (cv: number): number => Math.sqrt(Math.log1p(cv ** 2));

/** Sd of a low value: an absolute floor joined with a proportional part. */
export const twoPartSd = (value: number, floor: number, share: number): number => Math.hypot(floor, share * value);

/** Smallest change seen with `confidence` two-sided, from the sds of the two readings. */
export const smallestChangeSeen = (before: number, after: number, confidence: number): number =>
  normalQuantile(1 - (1 - confidence) / 2) * Math.hypot(before, after);

/** Per cent fall and rise seen when both readings have this coefficient of variation: lopsided, never +/- one figure. */
export function smallestRatioSeen(cv: number, confidence: number): { readonly fall: number; readonly rise: number } {
  const reach = normalQuantile(1 - (1 - confidence) / 2) * Math.SQRT2 * logSdOfCv(cv);
  return { fall: 100 * Math.expm1(-reach), rise: 100 * Math.expm1(reach) };
}
