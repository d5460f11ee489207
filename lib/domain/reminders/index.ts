import { addMonths, type Day, dayInWords } from '../days';
import { dayHalfReacted } from '../effects/intended';
import type { WarmMonths } from '../sampling';

/**
 * When a plot should be sampled next, by rule.
 *
 * After lime and after sulfur: the first day on which half of the product can have acted on this site (3 warm months for
 * sulfur, 4.2 for lime), because from that day a test can judge it; for sulfur that is close to the 60 to 90 days that
 * the blueberry pages of eXtension advise. Yearly: twelve months after the last sample, so that both are of one season
 * (the same season is advised by Virginia Tech, since fall pH reads 0.1 to 0.3 below spring).
 * Errors: no application or sample to count from, never warm enough in two years, or sampled since.
 */
export const RULE_KINDS = ['after-lime', 'after-sulfur', 'yearly-same-season'] as const;
export type RuleKind = (typeof RULE_KINDS)[number];

/** Days from the due day on which a person hears of it. */
export const NOTICE_OFFSETS: readonly number[] = [-14, 0, 14];

const MONTHS_OF_A_YEAR = 12;
const LONGEST_WAIT_DAYS = 731;

export type DueFacts = {
  readonly kind: RuleKind;
  readonly warmMonths: WarmMonths;
  readonly lastSampleOn: Day | null;
  readonly applications: readonly {
    readonly appliedOn: Day;
    readonly reaction: 'sulfur' | 'lime' | 'soluble-salt' | null;
  }[];
};

export type Due =
  | { readonly ok: true; readonly dueOn: Day; readonly sentence: string }
  | {
      readonly ok: false;
      readonly reason: 'nothing-spread' | 'no-sample-yet' | 'never-warm-enough' | 'already-sampled';
      readonly sentence: string;
    };

const none = (reason: Extract<Due, { ok: false }>['reason'], sentence: string): Due => ({
  ok: false,
  reason,
  sentence,
});

function afterSpreading(reaction: 'lime' | 'sulfur', facts: DueFacts): Due {
  const newest = facts.applications
    .filter((application) => application.reaction === reaction)
    .reduce<Day | null>((latest, { appliedOn }) => (latest === null || appliedOn > latest ? appliedOn : latest), null);
  if (newest === null) return none('nothing-spread', `No ${reaction} is recorded on this plot yet.`);
  const half = dayHalfReacted(reaction, newest, facts.warmMonths, LONGEST_WAIT_DAYS);
  if (!half.ok) {
    return none(
      'never-warm-enough',
      `By the warm months of this site the ${reaction} cannot act within two years. Check them in the settings.`,
    );
  }
  const spread = `the ${reaction} of ${dayInWords(newest)}`;
  if (facts.lastSampleOn !== null && facts.lastSampleOn >= half.day) {
    return none('already-sampled', `Sampled on ${dayInWords(facts.lastSampleOn)}, after ${spread} had time to act.`);
  }
  return { ok: true, dueOn: half.day, sentence: `Half of ${spread} can have acted by that day: a sample can show it.` };
}

export function nextDue(facts: DueFacts): Due {
  if (facts.kind === 'after-lime') return afterSpreading('lime', facts);
  if (facts.kind === 'after-sulfur') return afterSpreading('sulfur', facts);
  if (facts.lastSampleOn === null)
    return none('no-sample-yet', 'No sample is recorded on this plot yet, so there is no season to repeat.');
  return {
    ok: true,
    dueOn: addMonths(facts.lastSampleOn, MONTHS_OF_A_YEAR),
    sentence: `A year after the sample of ${dayInWords(facts.lastSampleOn)}: the same season again.`,
  };
}
