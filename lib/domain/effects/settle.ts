import { readingVariance } from './error-model';
import { ASSUMED_CORES, type SiteError } from './learn';
import { coresNeeded, largestStandardError } from './settle-math';
import type { Remedy, TestPoint, Verdict } from './types';

/**
 * What would settle it next time, cheapest first: more cores, a second bag each time, untreated plots, one more test of the
 * same season, else a larger step. Each is tried for a repeat of the check with one before and one after-test.
 */
const MOST_CORES = 20;
const USUAL_CORES = 15;
const MOST_CONTROLS = 4;

const plots = (count: number): string => (count === 1 ? 'one untreated plot' : `${count} untreated plots`);

const next = (what: string): string => `Next time ${what} would settle it.`;

export function remediesFor(input: {
  readonly verdict: Verdict;
  readonly error: SiteError;
  readonly after: TestPoint;
  readonly intendedOnScale: number;
  readonly rho: number;
  readonly controls: number;
}): readonly Remedy[] {
  const { verdict, error, after, rho } = input;
  if (verdict !== 'cannot tell yet' && verdict !== 'right way, size not settled') return [];
  const { noise, plot, occasion } = error;
  const target = largestStandardError(input.intendedOnScale, verdict === 'cannot tell yet' ? 'see' : 'size') ** 2;
  const rep = Math.sqrt(error.rep.variance);
  const v = (cores: number, bags = 1): number =>
    (plot.factor *
      readingVariance({ core: noise.core, cores, rep, wobble: noise.wobble, labDuplicates: after.labDuplicates })) /
    bags;
  const spread = (reading: number, controls: number): number =>
    reading * (1 + rho) * (controls > 0 ? 1 + 1 / controls : 1) + (controls > 0 ? 0 : 2 * occasion.variance);
  const now = after.cores ?? ASSUMED_CORES;
  const many = Math.max(now, USUAL_CORES);
  const found: Remedy[] = [];
  const factorOnV = spread(1, input.controls) - spread(0, input.controls);
  const cores = coresNeeded({
    variance: (target - spread(0, input.controls)) / factorOnV / plot.factor,
    core: noise.core,
    rep,
    labDuplicates: after.labDuplicates,
    wobble: noise.wobble,
  });
  if (
    cores.ok &&
    cores.cores > now &&
    cores.cores <= MOST_CORES &&
    spread(v(cores.cores), input.controls) <= target * (1 + 1e-9)
  ) {
    found.push({ kind: 'cores', count: cores.cores, text: next(`${cores.cores} cores in each sample`) });
  }
  if (spread(v(now, 2), input.controls) <= target) {
    found.push({ kind: 'second-composite', count: 2, text: next('a second bag from the plot each time') });
  } else if (spread(v(many, 2), input.controls) <= target) {
    found.push({ kind: 'second-composite', count: 2, text: next(`a second bag of ${many} cores each time`) });
  }
  for (let count = Math.max(1, input.controls + 1); count <= MOST_CONTROLS; count += 1) {
    if (spread(v(now), count) <= target) {
      found.push({ kind: 'controls', count, text: next(`leaving ${plots(count)}`) });
      break;
    }
    if (spread(v(many), count) <= target) {
      found.push({ kind: 'controls', count, text: next(`${many} cores and ${plots(count)}`) });
      break;
    }
    if (count === MOST_CONTROLS && spread(v(many, 2), count) <= target) {
      found.push({ kind: 'controls', count, text: next(`two bags of ${many} cores each time and ${plots(count)}`) });
    }
  }
  const reading = v(now);
  if (input.controls === 0 && (reading + occasion.variance) * 1.5 <= target) {
    found.push({ kind: 'another-test', count: 1, text: 'One more test next year in the same season would settle it.' });
  }
  if (found.length > 0) return found;
  const what =
    verdict === 'cannot tell yet' ? 'A change of this size cannot be told' : 'How far it moved cannot be settled';
  return [
    {
      kind: 'larger-step',
      text: `${what} on this plot in one season: plan a larger step, or judge over three seasons.`,
    },
  ];
}
