import { type AnalyteKey, analyte } from '../analytes';
import { addDays, addMonths, type Day, dayInWords, daysBetween } from '../days';
import type { ResultId } from '../ids';
import { isSameSeason, type WarmMonths } from '../sampling';
import { comparable } from './comparable';
import { dayHalfReacted } from './intended';
import type { DisturbingEvent, EffectInput, Intent, NoVerdict, RefusalCode, TestPoint } from './types';

/**
 * Which tests judge an application. Fixed before anything is seen: the after-test is the first confirmed comparable one from
 * the day half has reacted, at most 24 months after spreading, one of the same season as a before-test preferred; the
 * before-tests are those at most 24 months old at spreading with nothing else done to the analyte since.
 */
export const MAX_MONTHS = 24;
const MAX_WAIT_DAYS = 731;

export type NoAnswer = {
  readonly ok: false;
  readonly answer: NoVerdict;
  readonly reason: RefusalCode;
  readonly sentence: string;
  readonly from?: Day;
  readonly until?: Day;
  readonly before?: TestPoint;
  readonly after?: TestPoint;
};

export type Chosen = {
  readonly ok: true;
  readonly after: TestPoint;
  readonly before: readonly [TestPoint, ...TestPoint[]];
  readonly secondLook: boolean;
};

export type JudgingWindow =
  | { readonly ok: true; readonly from: Day; readonly until: Day; readonly firstSpread: Day; readonly lastSpread: Day }
  | { readonly ok: false; readonly reason: 'too-early' };

const byDay = (a: TestPoint, b: TestPoint): number => daysBetween(b.day, a.day) || (a.resultId < b.resultId ? -1 : 1);

/** From the day every product has half reacted to 24 months after the first spreading. */
export function judgingWindow(intents: readonly [Intent, ...Intent[]], flags: WarmMonths): JudgingWindow {
  let [firstSpread, lastSpread] = [intents[0].appliedOn, intents[0].appliedOn];
  let from: Day | null = null;
  for (const { appliedOn, reaction } of intents) {
    if (appliedOn < firstSpread) firstSpread = appliedOn;
    if (appliedOn > lastSpread) lastSpread = appliedOn;
    const half = dayHalfReacted(reaction, appliedOn, flags, MAX_WAIT_DAYS);
    if (!half.ok) return { ok: false, reason: 'too-early' };
    if (from === null || half.day > from) from = half.day;
  }
  const until = addMonths(firstSpread, MAX_MONTHS);
  if (from === null || from > until) return { ok: false, reason: 'too-early' };
  return { ok: true, from, until, firstSpread, lastSpread };
}

/** What happened between two tests that bears on the analyte and is not itself asked about. */
export function disturbances(
  events: readonly DisturbingEvent[],
  key: AnalyteKey,
  asked: readonly Intent[],
  from: Day,
  to: Day,
): readonly DisturbingEvent[] {
  return events.filter((event) => {
    if (event.day < from || event.day >= to) return false;
    if (event.kind !== 'other-application') return true;
    if (asked.some((intent) => intent.applicationId === event.applicationId)) return false;
    return event.affects?.includes(key) ?? false;
  });
}

function disturbed(events: readonly DisturbingEvent[], key: AnalyteKey, after: TestPoint, before: TestPoint): NoAnswer {
  const name = analyte(key).label;
  const other = events.find((event) => event.kind === 'other-application');
  if (other) {
    return {
      ok: false,
      answer: 'not comparable',
      reason: 'overlap',
      sentence: `${other.label} was spread between the two tests and acts on ${name} too. Only both together can be judged.`,
      before,
      after,
    };
  }
  const what = events.map((event) => `${event.label} (${dayInWords(event.day)})`).join(', ');
  return {
    ok: false,
    answer: 'not comparable',
    reason: 'too-late',
    sentence: `Too much has happened to the plot between the two tests: ${what}.`,
    before,
    after,
  };
}

function chooseAfter(
  tests: readonly TestPoint[],
  befores: readonly TestPoint[],
  window: Extract<JudgingWindow, { ok: true }>,
  byHand: ResultId | undefined,
): { readonly after: TestPoint; readonly secondLook: boolean } | null {
  const inTime = tests.filter(
    (test) => test.day > window.lastSpread && test.day >= window.from && test.day <= window.until,
  );
  const alike = inTime.filter((test) => befores.some((before) => comparable(before, test).ok));
  const ofSeason = alike.filter((test) =>
    befores.some((before) => isSameSeason(before.day, test.day) && comparable(before, test).ok),
  );
  const byRule = ofSeason[0] ?? alike[0] ?? inTime[0];
  const chosen = byHand === undefined ? byRule : tests.find((test) => test.resultId === byHand);
  if (chosen === undefined) return null;
  return { after: chosen, secondLook: byRule === undefined || chosen.resultId !== byRule.resultId };
}

function waiting(
  input: EffectInput,
  window: Extract<JudgingWindow, { ok: true }>,
  later: TestPoint | undefined,
): NoAnswer {
  const { from, until } = window;
  if (input.today > until) {
    return {
      ok: false,
      answer: 'not comparable',
      reason: 'too-late',
      sentence: `No test was taken by ${dayInWords(until)}, 24 months after spreading. Too much has happened since to say what the application did.`,
      from,
      until,
      ...(later ? { after: later } : {}),
    };
  }
  if (later !== undefined) {
    return {
      ok: false,
      answer: 'too early',
      reason: 'too-early',
      sentence: `The test of ${dayInWords(later.day)} came before half of it can have acted. A test from ${dayInWords(from)} on can judge.`,
      from,
      until,
      after: later,
    };
  }
  return {
    ok: false,
    answer: 'waiting for the after-test',
    reason: 'no-after-test',
    sentence: `No test since spreading yet. The first one from ${dayInWords(from)} to ${dayInWords(until)} judges it; the season of the earlier test is best.`,
    from,
    until,
  };
}

export function chooseTests(input: EffectInput): Chosen | NoAnswer {
  const mine = input.tests.filter((test) => test.analyte === input.analyte && test.plotId === input.plotId);
  const confirmed = mine.filter((test) => test.confirmed).toSorted(byDay);
  const window = judgingWindow(input.intents, input.warmMonths);
  if (!window.ok) {
    return {
      ok: false,
      answer: 'too early',
      reason: 'too-early',
      sentence:
        'By the warm months set for this site, half of it cannot have acted within 24 months of spreading. Check the warm months in the site settings.',
    };
  }
  const oldest = addMonths(window.firstSpread, -MAX_MONTHS);
  const befores = confirmed.filter((test) => test.day <= window.firstSpread && test.day >= oldest);
  const later = confirmed.findLast((test) => test.day > window.lastSpread);
  const choice = chooseAfter(confirmed, befores, window, input.afterTestId);
  if (choice === null) {
    const pending = mine.find((test) => !test.confirmed && test.day >= window.from && test.day <= window.until);
    if (pending)
      return {
        ok: false,
        answer: 'not comparable',
        reason: 'unconfirmed',
        sentence: `The test of ${dayInWords(pending.day)} still waits for your confirmation. Confirm its report first.`,
        after: pending,
      };
    return waiting(input, window, later);
  }
  const { after, secondLook } = choice;
  if (after.day < window.from) return waiting(input, window, after);
  if (after.day > window.until)
    return {
      ok: false,
      answer: 'not comparable',
      reason: 'too-late',
      sentence: `The test of ${dayInWords(after.day)} is more than 24 months after spreading. Too much has happened since.`,
      after,
    };
  const newest = befores.at(-1);
  if (newest === undefined) {
    return {
      ok: false,
      answer: 'no verdict',
      reason: 'no-before-test',
      sentence: `There is no test from the 24 months before ${dayInWords(window.firstSpread)}, so there is nothing to compare with.`,
      after,
    };
  }
  const alike = befores.filter((test) => comparable(test, after).ok);
  if (alike.length === 0) {
    const why = comparable(newest, after);
    if (!why.ok)
      return {
        ok: false,
        answer: why.reason === 'unknown-limit' ? 'no verdict' : 'not comparable',
        reason: why.reason,
        sentence: why.sentence,
        before: newest,
        after,
      };
  }
  const calm = alike.filter(
    (test) => disturbances(input.events, input.analyte, input.intents, test.day, after.day).length === 0,
  );
  const [first, ...others] = calm;
  if (first === undefined) {
    const before = alike.at(-1) ?? newest;
    return disturbed(
      disturbances(input.events, input.analyte, input.intents, before.day, after.day),
      input.analyte,
      after,
      before,
    );
  }
  return { ok: true, after, before: [first, ...others], secondLook };
}

/** A day of the before-test's season within the window that is still ahead of `after`. */
export function nextOfSeason(before: Day, after: Day, until: Day): Day | null {
  for (let months = 12; months <= 48; months += 12) {
    const day = addMonths(before, months);
    if (day > addDays(after, 0) && day <= until) return day;
  }
  return null;
}
