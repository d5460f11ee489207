import type { AnalyteKey } from '../analytes';
import { isSameSeason } from '../sampling';
import { comparable, sameLaboratory } from './comparable';
import { duplicateSumOfSquares, readingVariance, updateVariance, type VarianceEstimate } from './error-model';
import { DEFAULT_DF, type NoiseClass, noiseClassOf } from './noise-defaults';
import type { DuplicatePair, SiteNoise, TestPoint, UntreatedStep } from './types';

/**
 * The noise of one analyte on one site: the defaults, taught by the site's own duplicates and untreated plots.
 *
 * Laboratory duplicates update the laboratory's variance; the variance v of a reading is then put together again from its
 * parts and is the prior (8 degrees of freedom) that field duplicates and untreated plots update. Bags differ in cores, so
 * what is learnt is a factor on v: with equal bags this is the plain update. The mean change of untreated plots within one
 * season and laboratory updates the occasion variance. No outlier is dropped: `questionablePairs` names them.
 */
export const ASSUMED_CORES = 8;

export type SiteError = {
  readonly noise: NoiseClass;
  /** Of one reading's own error, on the working scale, after learning. */
  readonly varianceOf: (test: TestPoint) => number;
  readonly plot: { readonly df: number; readonly learnt: boolean; readonly factor: number };
  readonly rep: VarianceEstimate;
  readonly occasion: VarianceEstimate & { readonly learnt: boolean };
};

/** Squares divided by the prior variance they estimate, and how many they count for. */
export type StandardisedSquares = { readonly sum: number; readonly df: number };

export const onWorkingScale = (noise: NoiseClass, value: number): number =>
  noise.scale === 'log' ? Math.log(value) : value;

const measured = (noise: NoiseClass, test: TestPoint): boolean =>
  test.qualifier === 'exact' && (noise.scale === 'additive' || test.value > 0);

const usablePairs = (
  analyte: AnalyteKey,
  noise: NoiseClass,
  pairs: readonly DuplicatePair[],
): readonly DuplicatePair[] =>
  pairs.filter(
    ({ first, second }) =>
      first.analyte === analyte && measured(noise, first) && measured(noise, second) && comparable(first, second).ok,
  );

const difference = (noise: NoiseClass, { first, second }: DuplicatePair): number =>
  onWorkingScale(noise, first.value) - onWorkingScale(noise, second.value);

function partVariance(noise: NoiseClass, repVariance: number, test: TestPoint): number {
  const step = test.printedStep ?? 0;
  const rounding = noise.scale === 'log' && test.value > 0 ? step / test.value : step;
  return (
    readingVariance({
      core: noise.core,
      cores: test.cores ?? ASSUMED_CORES,
      rep: Math.sqrt(repVariance),
      labDuplicates: test.labDuplicates,
      wobble: noise.wobble,
      printedStep: rounding,
    }) / test.composites
  );
}

function usableSteps(
  analyte: AnalyteKey,
  noise: NoiseClass,
  steps: readonly UntreatedStep[],
): readonly UntreatedStep[] {
  return steps
    .map(({ pairs }) => ({
      pairs: pairs.filter(
        ({ before, after }) =>
          before.analyte === analyte &&
          measured(noise, before) &&
          measured(noise, after) &&
          comparable(before, after).ok,
      ),
    }))
    .filter(({ pairs }) => pairs.length > 0);
}

const mean = (values: readonly number[]): number => values.reduce((sum, value) => sum + value, 0) / values.length;

export function learnSiteError(
  analyte: AnalyteKey,
  taught: SiteNoise,
  also: readonly StandardisedSquares[] = [],
): { ok: true; error: SiteError } | { ok: false; reason: 'no-noise-figure' } {
  const found = noiseClassOf(analyte);
  if (!found.ok) return found;
  const { noise } = found;
  const labDifferences = usablePairs(analyte, noise, taught.labDuplicates).map((pair) => difference(noise, pair));
  const rep = updateVariance(
    { variance: noise.rep ** 2, df: DEFAULT_DF },
    duplicateSumOfSquares(labDifferences),
    labDifferences.length,
  );
  const prior = (test: TestPoint): number => partVariance(noise, rep.variance, test);

  const squares: StandardisedSquares[] = [...also];
  for (const pair of usablePairs(analyte, noise, taught.fieldDuplicates)) {
    squares.push({ sum: difference(noise, pair) ** 2 / (prior(pair.first) + prior(pair.second)), df: 1 });
  }
  const steps = usableSteps(analyte, noise, taught.untreatedSteps);
  for (const { pairs } of steps) {
    const changes = pairs.map(
      ({ before, after }) => onWorkingScale(noise, after.value) - onWorkingScale(noise, before.value),
    );
    const both = mean(pairs.map(({ before, after }) => prior(before) + prior(after)));
    const centre = mean(changes);
    squares.push({
      sum: changes.reduce((sum, change) => sum + (change - centre) ** 2, 0) / both,
      df: pairs.length - 1,
    });
  }
  const df = squares.reduce((sum, row) => sum + row.df, 0);
  const factor = (DEFAULT_DF + squares.reduce((sum, row) => sum + row.sum, 0)) / (DEFAULT_DF + df);
  const varianceOf = (test: TestPoint): number => factor * prior(test);

  let occasion: VarianceEstimate = { variance: noise.occasion ** 2, df: DEFAULT_DF };
  for (const { pairs } of steps) {
    const within = pairs.filter(
      ({ before, after }) => isSameSeason(before.day, after.day) && sameLaboratory(before, after),
    );
    if (within.length === 0) continue;
    const change = mean(
      within.map(({ before, after }) => onWorkingScale(noise, after.value) - onWorkingScale(noise, before.value)),
    );
    const v = mean(within.map(({ before, after }) => (varianceOf(before) + varianceOf(after)) / 2));
    occasion = updateVariance(occasion, Math.max(change ** 2 / 2 - v / within.length, 0), 1);
  }
  return {
    ok: true,
    error: {
      noise,
      varianceOf,
      plot: { df: DEFAULT_DF + df, learnt: df > 0 || labDifferences.length > 0, factor },
      rep,
      occasion: { ...occasion, learnt: occasion.df > DEFAULT_DF },
    },
  };
}

const FAR_APART = 3;

/** Duplicate pairs more than 3 root-2 sds apart: a question for the grower, never a deletion. */
export function questionablePairs(analyte: AnalyteKey, taught: SiteNoise): readonly DuplicatePair[] {
  const found = noiseClassOf(analyte);
  if (!found.ok) return [];
  const { noise } = found;
  const far = (pairs: readonly DuplicatePair[], variance: (pair: DuplicatePair) => number) =>
    usablePairs(analyte, noise, pairs).filter(
      (pair) => Math.abs(difference(noise, pair)) > FAR_APART * Math.sqrt(variance(pair)),
    );
  const prior = (test: TestPoint): number => partVariance(noise, noise.rep ** 2, test);
  return [
    ...far(taught.labDuplicates, () => 2 * noise.rep ** 2),
    ...far(taught.fieldDuplicates, ({ first, second }) => prior(first) + prior(second)),
  ];
}
