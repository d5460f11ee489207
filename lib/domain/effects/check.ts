import { analyte } from '../analytes';
import { chooseControls, controlReadings, scatterOf } from './controls';
import { type IntendedNow, intendedBy } from './intended';
import { judge, judgeLow } from './judge';
import { learnSiteError, onWorkingScale, type SiteError } from './learn';
import { isLow, lowEstimate } from './low-values';
import { notesFor } from './notes';
import { estimateAgainst, estimateAlone, heaviest, roundReadings, weighBefores } from './reading';
import { type Chosen, chooseTests, judgingWindow, type NoAnswer, nextOfSeason } from './select';
import { remediesFor } from './settle';
import type { BeforeUsed, ControlUse, EffectInput, EffectOutcome, Reading, SiteNoise, TestPoint } from './types';
import { type Speaker, speakerFor } from './words';

/**
 * Did the application do what it was meant to do? One plot, one analyte, with or without untreated plots.
 *
 * Purpose: D (the corrected change), its 90 % interval and one of seven verdicts, or a refusal that says what to do.
 * Units: pH in pH units; concentrations judged on natural logs and shown in their own unit. Valid for the analytes with a
 * noise figure (noise-defaults.ts). Refusals: the closed set of types.ts. Sources: beside each part (verdict.ts,
 * regression.ts, noise-defaults.ts, comparable.ts); R reference in fixtures/tables/effect-check.R.
 * Worked example: before 7.5, after 7.0, twelve plots with mean 6.9: D = -0.44, s = 0.174 (vector rtm-change).
 */
export const RULE_VERSION = 'effect-1';
const SMALLEST_PH = 0.2;
const SMALLEST_SHARE = 0.2;

const asOutcome = (none: NoAnswer): EffectOutcome => ({ ...none, ruleVersion: RULE_VERSION });

const tooSmall = (sentence: string, after?: TestPoint): NoAnswer => ({
  ok: false,
  answer: 'planned change too small to check',
  reason: 'plan-too-small',
  sentence,
  ...(after ? { after } : {}),
});

/** Untreated steps without the occasions judged now, whose scatter the controls bring themselves. */
const withoutJudged = (noise: SiteNoise, befores: readonly BeforeUsed[], after: TestPoint): SiteNoise => ({
  ...noise,
  untreatedSteps: noise.untreatedSteps.map(({ pairs }) => ({
    pairs: pairs.filter(
      (pair) => pair.after.day !== after.day || !befores.some((row) => row.test.day === pair.before.day),
    ),
  })),
});

type Facts = {
  readonly input: EffectInput;
  readonly chosen: Chosen;
  readonly intended: IntendedNow;
  readonly speaker: Speaker;
};
type Readings = {
  readonly alone?: Reading;
  readonly against?: Reading;
  readonly befores: readonly BeforeUsed[];
  readonly uses: readonly ControlUse[];
  readonly error: SiteError;
  readonly sitePlots: number;
};

function readingsOf({ input, chosen, intended, speaker }: Facts, error: SiteError): Readings | NoAnswer {
  const { after } = chosen;
  const spreadOn = input.intents[0].appliedOn;
  const weighed = weighBefores(error, chosen.before, after, spreadOn);
  const ofSeason = error.noise.season === 'refuse' ? weighed.filter((row) => row.sameSeason) : weighed;
  const aloneBefores =
    ofSeason.length > 0
      ? weighBefores(
          error,
          ofSeason.map((row) => row.test),
          after,
          spreadOn,
        )
      : [];
  const choice = chooseControls(input, weighed, after);
  if (aloneBefores.length === 0 && choice.used.length === 0) {
    const newest = chosen.before.at(-1) ?? chosen.before[0];
    return {
      ok: false,
      answer: 'not comparable',
      reason: 'season',
      sentence: `${analyte(input.analyte).label} reads differently in spring and in fall by itself. A test in the season of the earlier one would answer it, or untreated plots sampled with both.`,
      before: newest,
      after,
    };
  }
  const low = [...weighed.map((row) => row.test), after].some((test) => error.noise.scale === 'log' && isLow(test));
  const by = intended;
  const main = heaviest(aloneBefores.length > 0 ? aloneBefores : choice.befores)?.test ?? after;
  const base = { uses: choice.uses, error, sitePlots: roundReadings(error, input.siteTests, main).length };
  const aloneLow = low ? lowEstimate(error, aloneBefores, after, []) : null;
  const alone = low
    ? aloneLow && judgeLow(aloneLow, by, false, speaker)
    : aloneBefores.length > 0
      ? judge(
          estimateAlone(error, aloneBefores, after, input.siteTests, input.drift),
          error.noise.scale,
          by,
          false,
          speaker,
        )
      : null;
  if (choice.used.length === 0) return { ...base, ...(alone ? { alone } : {}), befores: aloneBefores };
  const learnt = learnSiteError(input.analyte, withoutJudged(input.noise, choice.befores, after), [
    scatterOf(error, choice.used),
  ]);
  const taught = learnt.ok ? learnt.error : error;
  const againstLow = low ? lowEstimate(taught, choice.befores, after, choice.used) : null;
  const against = low
    ? againstLow && judgeLow(againstLow, by, true, speaker)
    : judge(
        estimateAgainst(taught, choice.befores, after, controlReadings(taught, choice.used), input.siteTests),
        error.noise.scale,
        by,
        true,
        speaker,
      );
  return {
    ...base,
    error: taught,
    befores: choice.befores,
    ...(alone ? { alone } : {}),
    ...(against ? { against } : {}),
  };
}

function planSizeRefusal(
  input: EffectInput,
  planned: number,
  before: number,
  scale: 'additive' | 'log',
  speaker: Speaker,
): string | null {
  const size = Math.abs(planned);
  if (scale === 'additive') {
    return size < SMALLEST_PH - 1e-9
      ? `A planned change of ${speaker.size(planned)} is smaller than tests can tell: ${speaker.size(SMALLEST_PH)} is the least.`
      : null;
  }
  return size < SMALLEST_SHARE * before * (1 - 1e-9)
    ? `A planned change of ${speaker.size(planned)} is less than a fifth of the ${speaker.size(before)} that was there. That is smaller than tests of ${analyte(input.analyte).label} can tell.`
    : null;
}

export function checkEffect(input: EffectInput): EffectOutcome {
  const name = analyte(input.analyte).label;
  const learnt = learnSiteError(input.analyte, input.noise);
  if (!learnt.ok) {
    return asOutcome({
      ok: false,
      answer: 'no verdict',
      reason: 'no-noise-figure',
      sentence: `No published figure says how far two tests of ${name} differ by themselves, so no verdict is given. Both values stay in the history.`,
    });
  }
  const { error } = learnt;
  const planned = input.intents.reduce((sum, intent) => sum + intent.fullChange, 0);
  const unit = input.tests.find((test) => test.analyte === input.analyte)?.unit ?? analyte(input.analyte).unit;
  const speaker = speakerFor(input.analyte, unit);
  const early = error.noise.scale === 'additive' ? planSizeRefusal(input, planned, 0, 'additive', speaker) : null;
  if (early !== null) return asOutcome(tooSmall(early));
  const chosen = chooseTests(input);
  if (!chosen.ok) return asOutcome(chosen);
  const { after } = chosen;
  const beforeBelow = chosen.before.every((test) => test.qualifier === 'below');
  if (after.qualifier === 'below' && beforeBelow) {
    return asOutcome({
      ok: false,
      answer: 'no verdict',
      reason: 'both-below-limit',
      sentence: 'Both values are below what the laboratory can read, so no change can be told.',
      before: chosen.before[0],
      after,
    });
  }
  const printedZero = [...chosen.before, after].find(
    (test) => error.noise.scale === 'log' && test.qualifier === 'exact' && test.value === 0,
  );
  if (printedZero) {
    return asOutcome({
      ok: false,
      answer: 'no verdict',
      reason: 'unknown-limit',
      sentence:
        'A printed 0 means below a limit that the report does not name. Ask the laboratory for its reporting limit and correct the result.',
      before: chosen.before[0],
      after,
    });
  }
  const intended = intendedBy(input.intents, after.day, input.warmMonths);
  if (intended.byThen === 0 || Math.sign(intended.byThen) !== Math.sign(planned)) {
    return asOutcome(tooSmall('Nothing of the planned change was really spread, so there is nothing to check.', after));
  }
  const facts = { input, chosen, intended, speaker };
  const read = readingsOf(facts, error);
  if ('ok' in read) return asOutcome(read);
  const reading = read.against ?? read.alone;
  if (reading === undefined) return asOutcome(tooSmall('No reading could be made of these tests.', after));
  const late =
    error.noise.scale === 'log' ? planSizeRefusal(input, planned, reading.correctedBefore, 'log', speaker) : null;
  if (late !== null) return asOutcome(tooSmall(late, after));

  const usedControls = read.uses.filter((use) => use.used).length;
  const onScale =
    error.noise.scale === 'log' && reading.scale === 'log'
      ? onWorkingScale(error.noise, 1 + intended.byThen / reading.correctedBefore)
      : intended.byThen;
  const settle =
    reading.scale === 'low-values' || !Number.isFinite(onScale)
      ? []
      : remediesFor({
          verdict: reading.verdict,
          error: read.error,
          after,
          intendedOnScale: onScale,
          rho: reading.rho,
          controls: usedControls,
        });
  const window = judgingWindow(input.intents, input.warmMonths);
  const main = heaviest(read.befores)?.test ?? chosen.before[0];
  const withoutControls = read.against && read.alone ? { withoutControls: read.alone } : {};
  const notes = notesFor({
    reading,
    ...withoutControls,
    intended,
    befores: read.befores,
    after,
    controls: read.uses,
    sitePlots: read.sitePlots,
    secondLook: chosen.secondLook,
    combined: input.intents.map((intent) => intent.material),
    nextOfSeason: window.ok ? nextOfSeason(main.day, after.day, window.until) : null,
    settle,
    speaker,
  });
  return {
    ok: true,
    verdict: reading.verdict,
    reading,
    ...withoutControls,
    unit,
    intended: intended.byThen,
    planned,
    reactedShare: intended.share,
    before: read.befores,
    after,
    controls: read.uses,
    secondLook: chosen.secondLook,
    combined: input.intents.length > 1,
    sentences: [reading.sentence, ...notes],
    settle,
    ruleVersion: RULE_VERSION,
  };
}
