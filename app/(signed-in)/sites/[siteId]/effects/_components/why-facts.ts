import type { ControlUse, NoiseComponent, Reading } from '@/lib/domain/effects';
import { formatNumber, formatSigned, withUnit } from '@/lib/ui/charts/numbers';
import type { ChartAnalyte } from '@/lib/ui/charts/types';
import type { Judged } from './effect-props';

/** The inputs of a verdict in words, for whoever wants to know why. */

export const COMPONENT_WORDS: Readonly<Record<NoiseComponent['key'], string>> = {
  'plot-before': 'The earlier tests: cores, laboratory, the plot itself',
  'plot-after': 'The later test: cores, laboratory, the plot itself',
  controls: 'The untreated plots: their own cores and laboratory',
  occasion: 'The days: weather and the laboratory’s batch',
  season: 'Another season',
  laboratory: 'Another laboratory',
  'site-mean': 'How well the usual value of this site is known',
  drift: 'The drift of this plot by itself',
  reliability: 'How well the spread between plots is known',
};

const UNUSED: Readonly<Record<NonNullable<ControlUse['why']>, string>> = {
  'not-sampled-the-same-days': 'not sampled on the same days',
  'other-laboratory': 'sent to another laboratory',
  'not-comparable': 'tested by another method or to another depth',
  'something-happened': 'treated or disturbed in between',
  'below-limit': 'below what the laboratory can tell',
};

export const controlWords = (use: ControlUse): string =>
  use.used ? 'used' : `not used: ${use.why === undefined ? 'not comparable' : UNUSED[use.why]}`;

const changeDigits = (analyte: ChartAnalyte): number => (analyte.isPh ? 2 : analyte.decimals + 1);

/** One standard deviation: pH units, per cent of the value on the log scale, else the unit itself. */
export function noiseSize(
  component: Pick<NoiseComponent, 'variance'>,
  reading: Reading,
  analyte: ChartAnalyte,
): string {
  const sd = Math.sqrt(component.variance);
  if (reading.scale === 'log') return `${(100 * sd).toFixed(0)} %`;
  return withUnit(formatNumber(sd, changeDigits(analyte)), analyte.unit);
}

export const learntWords = (component: Pick<NoiseComponent, 'learnt'>): string =>
  component.learnt ? 'learnt on this site' : 'default from published figures';

const percent = (share: number): string => `${Math.round(100 * share)} %`;

export type Fact = { term: string; said: string; note?: string };

export function whyFacts(outcome: Judged, analyte: ChartAnalyte): Fact[] {
  const { reading, planned, intended, reactedShare } = outcome;
  const digits = changeDigits(analyte);
  const change = (value: number) => withUnit(formatSigned(value, digits), analyte.unit);
  const value = (amount: number) => withUnit(formatNumber(amount, digits), analyte.unit);
  const spreadShare = planned * reactedShare === 0 ? 1 : intended / (planned * reactedShare);
  const facts: Fact[] = [
    { term: 'Planned in full', said: change(planned) },
    { term: 'Reacted by the later test', said: percent(reactedShare), note: 'by the warm months of the site' },
  ];
  if (Math.abs(spreadShare - 1) > 0.005) {
    facts.push({ term: 'Spread of what was planned', said: percent(spreadShare) });
  }
  facts.push({ term: 'Due by the later test', said: change(intended) });
  facts.push(
    reading.rho < 1 && reading.correction !== 0
      ? {
          term: 'Correction of the earlier value',
          said: change(-reading.correction),
          note: `It counts as ${value(reading.correctedBefore)} instead of ${value(reading.correctedBefore + reading.correction)}: an extreme reading comes back a little by itself.`,
        }
      : { term: 'Correction of the earlier value', said: 'none' },
  );
  const sd = reading.scale === 'log' ? `${(100 * reading.s).toFixed(0)} %` : value(reading.s);
  facts.push({
    term: 'Noise of the change, together',
    said: sd,
    note: `one standard error, ${reading.nu.toFixed(1)} degrees of freedom; the interval reaches ${reading.q.toFixed(2)} times as far on each side`,
  });
  return facts;
}
