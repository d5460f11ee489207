import Link from 'next/link';
import type { Report } from '@/lib/schemas/reports';
import type { Review } from '@/lib/schemas/review';
import { Notice } from '@/lib/ui/feedback/notice';
import { valuesToConfirm } from './missing';
import { counted, onDay } from './report-words';

/** Confirmed: by whom, how much, and where it now stands. */
export function ConfirmedNotice({ siteId, review, report }: { siteId: string; review: Review; report: Report }) {
  const ids = new Set(
    review.samples
      .filter((one) => one.leftOutReason === null && one.sameAsId === null)
      .flatMap((one) => (one.plotId === null ? [] : [one.plotId])),
  );
  const plots = review.plots.filter((plot) => ids.has(plot.id));
  const values = valuesToConfirm(review);
  return (
    <Notice
      tone="saved"
      title={`Confirmed by ${report.confirmedBy?.name ?? 'somebody who has left'}${report.confirmedAt ? `, ${onDay(report.confirmedAt)}` : ''}`}
    >
      {values > 0
        ? `${counted(values, 'value')} stand in the history of `
        : 'It adds nothing of its own: its samples count through another report or are left out.'}
      {plots.map((plot, at) => (
        <span key={plot.id}>
          {at === 0 ? '' : at === plots.length - 1 ? ' and ' : ', '}
          <Link className="text-link inline-block py-1 font-semibold" href={`/sites/${siteId}/plots/${plot.id}`}>
            {plot.name}
          </Link>
        </span>
      ))}
      {values > 0 ? '. They do not change any more; a wrong confirmation can be withdrawn with a reason.' : ''}
      {report.origin === 'own-sheet' && values > 0
        ? ' They come from a spreadsheet of your own: typed by the grower, with no laboratory page behind them.'
        : ''}
      {report.origin === 'file' ? (
        <>
          {' '}
          What its labels meant is kept for the next report of this form:{' '}
          <Link className="text-link inline-block py-1" href={`/sites/${siteId}/reports/learnt`}>
            what was learnt
          </Link>
          .
        </>
      ) : null}
    </Notice>
  );
}
