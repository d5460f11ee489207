import Link from 'next/link';
import { asDay, dayInWords } from '@/lib/domain/days';
import type { Review } from '@/lib/schemas/review';
import { Notice } from '@/lib/ui/feedback/notice';
import { counted } from './report-words';

/** Says that earlier confirmations of this form were used, how far, and where to see or forget them. */
export function ReadWithMemory({ siteId, review }: { siteId: string; review: Review }) {
  const learnt = review.rows.flatMap((row) => (row.learnt === null || row.state === 'removed' ? [] : [row.learnt]));
  const otherwise = review.rows.filter((row) => row.doubts.some((doubt) => doubt.code === 'learnt-otherwise')).length;
  const newest = learnt
    .map((one) => one.on)
    .sort()
    .at(-1);
  const filled = learnt.filter((one) => one.filled.length > 0).length;
  if (filled === 0 && otherwise === 0) return null;
  return (
    <Notice
      title={
        newest === undefined
          ? 'You confirmed this form before'
          : `You confirmed this form on ${dayInWords(asDay(newest))}`
      }
    >
      {filled > 0 ? `${counted(filled, 'row')} took from there what this page leaves open; each says so. ` : ''}
      {otherwise > 0
        ? `${counted(otherwise, 'row')} ${otherwise === 1 ? 'says' : 'say'} something else than then and ${otherwise === 1 ? 'is' : 'are'} marked. `
        : ''}
      <Link className="text-link inline-block py-1" href={`/sites/${siteId}/reports/learnt`}>
        What was learnt
      </Link>
    </Notice>
  );
}
