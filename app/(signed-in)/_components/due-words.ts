import { asDay, dayInWords } from '@/lib/domain/days';
import type { DueAnswer, RuleAnswer } from '@/lib/schemas/reminders';
import type { Status } from '@/lib/ui/feedback/status-word';

const days = (n: number) => `${n} days`;

/** Before that there is nothing to put off and nothing taken too early. */
export const ACT_WITHIN_DAYS = 30;

/** "Due in 12 days"; the day itself is said beside it. */
export function whenDue(due: Pick<DueAnswer, 'inDays'>): { status: Status; words: string } {
  if (due.inDays < 0) {
    return { status: 'needs-you', words: due.inDays === -1 ? 'Due yesterday' : `Due ${days(-due.inDays)} ago` };
  }
  if (due.inDays === 0) return { status: 'needs-you', words: 'Due today' };
  return { status: 'waiting', words: due.inDays === 1 ? 'Due tomorrow' : `Due in ${days(due.inDays)}` };
}

/** True while this person has asked not to hear of it. */
export const isResting = (due: Pick<DueAnswer, 'snoozedUntil'>, today: string): boolean =>
  due.snoozedUntil !== null && due.snoozedUntil > today;

export const inWords = (day: string): string => dayInWords(asDay(day));

export const RULE_WORDS: Record<RuleAnswer['kind'], string> = {
  'after-sulfur': 'After sulfur',
  'after-lime': 'After lime',
  'yearly-same-season': 'Yearly, same season',
};

export const RULE_ORDER: readonly RuleAnswer['kind'][] = ['after-sulfur', 'after-lime', 'yearly-same-season'];
