import type { Blocker, Review } from '@/lib/schemas/review';
import { counted } from './report-words';

type Code = Blocker['code'] | 'no-rows';
export type Missing = { code: Code; sentence: string; blockers: readonly Blocker[] };

const WORDS: Record<Code, (count: number) => string> = {
  'no-samples': () => 'no sample that counts',
  'no-plot': (count) => `${counted(count, 'sample')} without a plot`,
  'no-day': (count) => `${counted(count, 'sample')} without a day`,
  impossible: (count) => `${counted(count, 'value')} to mend`,
  'no-analyte': (count) => `${counted(count, 'row')} without an analyte`,
  'no-value': (count) => `${counted(count, 'row')} without a value`,
  'no-rows': (count) => `${counted(count, 'sample')} without values`,
  twice: (count) => `${counted(count, 'row')} standing there twice`,
  'same-analysis': (count) => `${counted(count, 'sample')} that may count twice`,
  'same-as-open': (count) => `${counted(count, 'sample')} leaning on a report that is not confirmed`,
};

/** A sample without any row is another thing than a row without its value. */
const codeOf = (one: Blocker): Code => (one.code === 'no-value' && one.rowId === null ? 'no-rows' : one.code);

/** What stands in the way, one line a kind, in the order in which it is met on the page. */
export function missingOf(blockers: readonly Blocker[], separate: ReadonlySet<string>): readonly Missing[] {
  const open = blockers.filter(
    (one) => one.code !== 'same-analysis' || one.reportSampleId === null || !separate.has(one.reportSampleId),
  );
  const codes = [...new Set(open.map(codeOf))];
  return codes.map((code) => {
    const mine = open.filter((one) => codeOf(one) === code);
    return { code, sentence: WORDS[code](mine.length), blockers: mine };
  });
}

/** How many values a confirmation would write: rows left in, of samples that count and stand for themselves. */
export function valuesToConfirm(review: Pick<Review, 'samples' | 'rows'>): number {
  const counting = new Set(
    review.samples.filter((one) => one.leftOutReason === null && one.sameAsId === null).map((one) => one.id),
  );
  return review.rows.filter((row) => row.state !== 'removed' && counting.has(row.reportSampleId)).length;
}

export function unsettledSentence(counts: { saving: number; failed: number; conflicts: number; invalid: number }) {
  const parts = [
    counts.invalid > 0 && `${counted(counts.invalid, 'typed value')} refused`,
    counts.conflicts > 0 && `${counted(counts.conflicts, 'cell')} with two values`,
    counts.failed > 0 && `${counted(counts.failed, 'change')} not saved`,
    counts.saving > 0 && `${counted(counts.saving, 'change')} being saved`,
  ].filter((part) => part !== false);
  return parts.length > 0 ? parts.join(', ') : null;
}
