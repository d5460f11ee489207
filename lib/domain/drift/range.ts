import { satterthwaite } from '../effects/error-model';
import { learnSiteError } from '../effects/learn';
import { isLow } from '../effects/low-values';
import type { SiteNoise, TestPoint } from '../effects/types';
import { tQuantile } from '../quantiles';

/**
 * The 95 % range of one reading: the plot's own error and the occasion's shift, in the analyte's unit (log-symmetric for
 * concentrations). null where no noise figure is published or the value is only known against a limit.
 */
const BOTH_SIDES = 0.975;

export function readingRange(
  test: TestPoint,
  noise: SiteNoise,
): { readonly low: number; readonly high: number } | null {
  const learnt = learnSiteError(test.analyte, noise);
  if (!learnt.ok || test.qualifier !== 'exact') return null;
  const { error } = learnt;
  const own = { variance: error.varianceOf(test), df: error.plot.df };
  const reach =
    tQuantile(BOTH_SIDES, satterthwaite([own, error.occasion])) * Math.sqrt(own.variance + error.occasion.variance);
  if (error.noise.scale === 'additive') return { low: test.value - reach, high: test.value + reach };
  if (test.value <= 0) return null;
  if (isLow(test)) {
    const sd = Math.hypot(
      (test.reportingLimit ?? 0) / 3,
      test.value * Math.sqrt(own.variance + error.occasion.variance),
    );
    const wide = tQuantile(BOTH_SIDES, satterthwaite([own, error.occasion])) * sd;
    return { low: Math.max(0, test.value - wide), high: test.value + wide };
  }
  return { low: test.value * Math.exp(-reach), high: test.value * Math.exp(reach) };
}
