import { dayInWords } from '../days';
import { tQuantile } from '../quantiles';
import { isSameSeason } from '../sampling';
import { comparable, sameLaboratory } from './comparable';
import { satterthwaite, twoPartSd } from './error-model';
import { ASSUMED_CORES, learnSiteError, onWorkingScale, type SiteError } from './learn';
import { isLow } from './low-values';
import type { CompareInput, CompareOutcome, NoiseComponent, RefusalCode, TestPoint, WorkingScale } from './types';
import { CONFIDENCE_PER_SIDE } from './verdict';
import { intervalInWords, type Speaker, speakerFor } from './words';

/**
 * Two tests side by side, of one plot or of two: b minus a with a 90 % interval, and whether that is more than noise.
 *
 * Variance: both readings' own errors, plus the occasion twice unless both were taken on one day and read by one laboratory,
 * plus season and laboratory once each where the tests differ in them. No correction for regression to the mean: nothing is
 * claimed about a cause. Worked example: two pH readings of 15 cores, same season and laboratory, differ by noise when they
 * are less than about 0.33 apart.
 */
const NO_NOISE =
  'No published figure says how far two tests of it differ by themselves, so the two values stand side by side.';

type Scaled = {
  readonly difference: number;
  readonly variance: number;
  readonly nu: number;
  readonly components: readonly NoiseComponent[];
};

function differenceOf(error: SiteError, a: TestPoint, b: TestPoint, scale: WorkingScale): Scaled {
  const { noise, plot, occasion } = error;
  const level = (test: TestPoint): number => (scale === 'low-values' ? test.value : 1);
  const own = (test: TestPoint): number => {
    if (scale !== 'low-values') return error.varianceOf(test);
    const limit = Math.max(a.reportingLimit ?? 0, b.reportingLimit ?? 0);
    return twoPartSd(test.value, limit / 3, Math.sqrt(error.varianceOf(test))) ** 2;
  };
  const sameOccasion = a.day === b.day && sameLaboratory(a, b);
  const largest = Math.max(level(a), level(b));
  const seasonSd = noise.season === 'refuse' || isSameSeason(a.day, b.day) ? 0 : noise.season;
  const all: NoiseComponent[] = [
    { key: 'plot-before', variance: own(a), df: plot.df, learnt: plot.learnt },
    { key: 'plot-after', variance: own(b), df: plot.df, learnt: plot.learnt },
    {
      key: 'occasion',
      variance: sameOccasion ? 0 : occasion.variance * (level(a) ** 2 + level(b) ** 2),
      df: occasion.df,
      learnt: occasion.learnt,
    },
    { key: 'season', variance: (seasonSd * largest) ** 2, df: 8, learnt: false },
    { key: 'laboratory', variance: sameLaboratory(a, b) ? 0 : (noise.laboratory * largest) ** 2, df: 8, learnt: false },
  ];
  const components = all.filter((component) => component.variance > 0);
  const shared = components.filter((component) => !component.key.startsWith('plot'));
  const value = (test: TestPoint): number => (scale === 'log' ? onWorkingScale(noise, test.value) : test.value);
  return {
    difference: value(b) - value(a),
    variance: components.reduce((sum, component) => sum + component.variance, 0),
    nu: satterthwaite([{ variance: own(a) + own(b), df: plot.df }, ...shared]),
    components,
  };
}

function sentenceFor(
  a: TestPoint,
  b: TestPoint,
  at: { difference: number; lo: number; hi: number; moreThanNoise: boolean },
  widened: readonly string[],
  speaker: Speaker,
): string {
  const size = speaker.size(at.difference);
  const interval = intervalInWords(at.lo, at.hi, at.difference, speaker);
  const wider =
    widened.length > 0 ? ` The interval is wider because they are from another ${widened.join(' and another ')}.` : '';
  const end = at.moreThanNoise
    ? 'That is more than noise.'
    : 'That is within what two tests of the same soil differ by.';
  if (a.plotId === b.plotId) {
    const verb = at.difference < 0 ? 'lower' : 'higher';
    return `${speaker.name} is ${size} ${verb} on ${dayInWords(b.day)} than on ${dayInWords(a.day)} (${interval}). ${end}${wider}`;
  }
  return `The second plot reads ${size} ${at.difference < 0 ? 'lower' : 'higher'} in ${speaker.name} (${interval}). ${end}${wider}`;
}

export function compareTests({ a, b, noise: taught }: CompareInput): CompareOutcome {
  const refuse = (reason: RefusalCode, sentence: string): CompareOutcome => ({ ok: false, reason, sentence, a, b });
  const may = comparable(a, b);
  if (!may.ok) return refuse(may.reason, may.sentence);
  const learnt = learnSiteError(a.analyte, taught);
  if (!learnt.ok) return refuse('no-noise-figure', NO_NOISE);
  const { error } = learnt;
  const otherSeason = !isSameSeason(a.day, b.day);
  if (error.noise.season === 'refuse' && otherSeason) {
    return refuse(
      'season',
      'This analyte reads differently in spring and in fall by itself. Compare tests of one season.',
    );
  }
  if (a.qualifier === 'below' && b.qualifier === 'below') {
    return refuse('both-below-limit', 'Both values are below what the laboratory can read.');
  }
  if (error.noise.scale === 'log' && [a, b].some((test) => test.qualifier === 'exact' && test.value === 0)) {
    return refuse(
      'unknown-limit',
      'A printed 0 means below a limit that the report does not name. Ask the laboratory for its reporting limit.',
    );
  }
  const low = error.noise.scale === 'log' && (isLow(a) || isLow(b));
  const scale: WorkingScale = low ? 'low-values' : error.noise.scale;
  const { difference, variance, nu, components } = differenceOf(error, a, b, scale);
  const s = Math.sqrt(variance);
  const reach = tQuantile(CONFIDENCE_PER_SIDE, nu) * s;
  const slackLow = b.qualifier === 'below' ? b.value : 0;
  const slackHigh = a.qualifier === 'below' ? a.value : 0;
  const [lo, hi] = [difference - reach - slackLow, difference + reach + slackHigh];
  const middle = difference + (slackHigh - slackLow) / 2;
  const natural = (change: number): number => (scale === 'log' ? a.value * Math.expm1(change) : change);
  const moreThanNoise = lo > 0 || hi < 0;
  const widenedBy: ('season' | 'laboratory')[] = [];
  if (otherSeason) widenedBy.push('season');
  if (!sameLaboratory(a, b)) widenedBy.push('laboratory');
  const at = { difference: natural(middle), lo: natural(lo), hi: natural(hi), moreThanNoise };
  const notes = [a, b].some((test) => test.cores === null)
    ? [`Where the number of cores was not written down, ${ASSUMED_CORES} are assumed.`]
    : [];
  return {
    ok: true,
    scale,
    ...at,
    ...(scale === 'log' ? { ratio: { estimate: Math.exp(difference), lo: Math.exp(lo), hi: Math.exp(hi) } } : {}),
    s,
    nu,
    unit: a.unit,
    widenedBy,
    components,
    sentence: sentenceFor(a, b, at, widenedBy, speakerFor(a.analyte, a.unit)),
    notes,
  };
}
