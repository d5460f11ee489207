import { can } from '@/lib/access/table';
import type { Today } from '@/lib/schemas/today';
import { isResting } from '../../_components/due-words';

const counted = (n: number, one: string, many: string): string[] => (n === 0 ? [] : [`${n} ${n === 1 ? one : many}`]);

/** One sentence over all sites: what asks for this person today. */
export function summaryOf({ today, sites }: Today): string {
  if (sites.length === 0) return '';
  const due = sites.flatMap((site) => site.due).filter((one) => one.inDays <= 0 && !isResting(one, today)).length;
  const soon = sites.flatMap((site) => site.due).filter((one) => one.inDays > 0 && !isResting(one, today)).length;
  const waiting = sites.flatMap(({ role, reports }) => reports.map(({ state }) => ({ role, state })));
  const inReview = waiting.filter(({ state }) => state === 'in-review');
  const confirm = inReview.filter(({ role }) => can(role, 'reading.decide')).length;
  const review = inReview.filter(({ role }) => !can(role, 'reading.decide') && can(role, 'reading.work')).length;
  const parts = [
    ...counted(due, 'sample is due', 'samples are due'),
    ...(due > 0
      ? counted(soon, 'comes due within a month', 'come due within a month')
      : counted(soon, 'sample comes due within a month', 'samples come due within a month')),
    ...counted(confirm, 'report waits for you to confirm it', 'reports wait for you to confirm them'),
    ...counted(review, 'report can be reviewed', 'reports can be reviewed'),
  ];
  if (parts.length === 0) return 'Nothing is due.';
  const last = parts.pop() ?? '';
  const text = parts.length > 0 ? `${parts.join(', ')} and ${last}` : last;
  return `${text}.`;
}
