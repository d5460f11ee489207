import type { Day } from '../days';
import { dayInWords } from '../days';
import { agreement, type IntendedNow, planLogSd } from './intended';
import { ASSUMED_CORES } from './learn';
import { MIN_PLOTS_FOR_A_MEAN } from './regression';
import type { BeforeUsed, ControlUse, Reading, Remedy, TestPoint } from './types';
import { listInWords, type Speaker } from './words';

/** The sentences under the verdict, in the order in which they are shown. */
export type NoteFacts = {
  readonly reading: Reading;
  readonly withoutControls?: Reading;
  readonly intended: IntendedNow;
  readonly befores: readonly BeforeUsed[];
  readonly after: TestPoint;
  readonly controls: readonly ControlUse[];
  readonly sitePlots: number;
  readonly secondLook: boolean;
  readonly combined: readonly string[];
  readonly nextOfSeason: Day | null;
  readonly settle: readonly Remedy[];
  readonly speaker: Speaker;
};

const EXPLAINED = 0.1;

const WHY_UNUSED: Readonly<Record<NonNullable<ControlUse['why']>, string>> = {
  'not-sampled-the-same-days': 'not sampled on the same days',
  'other-laboratory': 'sent to another laboratory',
  'not-comparable': 'tested by another method or to another depth',
  'something-happened': 'treated or disturbed in between',
  'below-limit': 'below what the laboratory can tell',
};

function missed({ reading, intended }: NoteFacts): string[] {
  if (reading.verdict !== 'short of it' && reading.verdict !== 'beyond it') return [];
  const relative = reading.scale === 'log' ? Math.log1p(intended.byThen / reading.correctedBefore) : intended.byThen;
  if (!Number.isFinite(relative)) return [];
  const p = agreement(reading.D, reading.s, relative, planLogSd() * Math.abs(relative));
  return [
    p >= EXPLAINED
      ? 'The miss is no larger than the uncertainty of a published rate explains.'
      : 'The miss is larger than the unknowns of the soil explain: check amount, depth, spreading and sample.',
  ];
}

function correction({ reading, sitePlots, speaker }: NoteFacts): string[] {
  if (reading.scale === 'low-values') return [];
  if (sitePlots < MIN_PLOTS_FOR_A_MEAN) {
    return [
      'With fewer than three plots tested that day the earlier value cannot be corrected: one extreme reading by itself makes a result look better than it is.',
    ];
  }
  const from = speaker.value(reading.correctedBefore + reading.correction);
  const to = speaker.value(reading.correctedBefore);
  return from === to
    ? []
    : [
        `The earlier value counts as ${to} instead of ${from}, because an extreme reading comes back a little by itself.`,
      ];
}

function cost({ befores, nextOfSeason, reading }: NoteFacts): string[] {
  const notes: string[] = [];
  if (!reading.withControls && befores.some((row) => !row.sameSeason)) {
    const next = nextOfSeason === null ? '' : ` A test near ${dayInWords(nextOfSeason)} would be of the same season.`;
    notes.push(
      `The tests are of another season, so the interval is wider.${next} Untreated plots sampled with it would take that cost away.`,
    );
  }
  if (!reading.withControls && befores.some((row) => !row.sameLaboratory)) {
    notes.push('The tests come from two laboratories, so the interval is wider.');
  }
  return notes;
}

function controls({ controls: uses, reading, withoutControls }: NoteFacts): string[] {
  const notes: string[] = [];
  const used = uses.filter((use) => use.used).map((use) => use.name);
  if (used.length > 0)
    notes.push(`Compared with the untreated ${used.length === 1 ? 'plot' : 'plots'} ${listInWords(used)}.`);
  const unused = Object.entries(WHY_UNUSED).flatMap(([why, words]) => {
    const names = uses.filter((use) => use.why === why).map((use) => use.name);
    return names.length > 0 ? [`${listInWords(names)} (${words})`] : [];
  });
  if (unused.length > 0) notes.push(`Not usable as untreated plots: ${unused.join('; ')}.`);
  if (withoutControls && reading.s > withoutControls.s) {
    notes.push(
      `So few untreated plots make the interval wider, but they guard against shifts nobody knows of. Without them: ${withoutControls.sentence}`,
    );
  }
  return notes;
}

export function notesFor(facts: NoteFacts): readonly string[] {
  const unknownCores = [...facts.befores.map((row) => row.test), facts.after].some((test) => test.cores === null);
  const first = facts.settle[0];
  return [
    ...(first ? [first.text] : []),
    ...missed(facts),
    ...cost(facts),
    ...controls(facts),
    ...correction(facts),
    ...(facts.combined.length > 1 ? [`Judged together: ${listInWords(facts.combined)}.`] : []),
    ...(facts.secondLook ? ['A second look: this is not the test that was to judge the application.'] : []),
    ...(unknownCores ? [`Where the number of cores was not written down, ${ASSUMED_CORES} are assumed.`] : []),
  ];
}
