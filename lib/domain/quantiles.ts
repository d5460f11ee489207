import jstat from 'jstat';

/**
 * Quantiles and tails of the normal and of Student's t distribution.
 *
 * Method: jStat's functions; the t quantile gets one Newton step on its own distribution function, because the bare
 * inverse is off by up to 5e-8. Above a million degrees of freedom t is the normal distribution to nine digits.
 * Valid for 0 < p < 1 and df > 0; otherwise a RangeError (a programming mistake, not an answer for people).
 * Checked against R 4.2.2 (qt, pt, qnorm) in fixtures/tables/effect-check.vectors.json.
 * Worked example: tQuantile(0.95, 8) = 1.8595480.
 */
const { studentt, normal } = jstat.jStat;
const NEARLY_NORMAL = 1e6;

const checkProbability = (p: number): void => {
  if (!(p > 0 && p < 1)) throw new RangeError(`A probability lies between 0 and 1, not ${p}.`);
};

export function normalQuantile(p: number): number {
  checkProbability(p);
  return normal.inv(p, 0, 1);
}

export const normalDensity = (z: number): number => Math.exp(-(z * z) / 2) / Math.sqrt(2 * Math.PI);

/** P(Z <= z). */
export const normalTail = (z: number): number => normal.cdf(z, 0, 1);

export function tQuantile(p: number, df: number): number {
  checkProbability(p);
  if (!(df > 0)) throw new RangeError(`Degrees of freedom are above 0, not ${df}.`);
  if (df > NEARLY_NORMAL) return normalQuantile(p);
  const start = studentt.inv(p, df);
  return start - (studentt.cdf(start, df) - p) / studentt.pdf(start, df);
}

/** P(T > t). */
export function tUpperTail(t: number, df: number): number {
  if (!(df > 0)) throw new RangeError(`Degrees of freedom are above 0, not ${df}.`);
  return df > NEARLY_NORMAL ? 1 - normalTail(t) : 1 - studentt.cdf(t, df);
}
