import Link from 'next/link';
import type { Role } from '@/lib/access/table';
import { can } from '@/lib/access/table';
import type { BatchHead } from '@/lib/schemas/batches';
import type { TodayReport } from '@/lib/schemas/today';
import { type Status, StatusWord } from '@/lib/ui/feedback/status-word';
import { inWords } from '../../_components/due-words';

const samples = (n: number) => (n === 1 ? '1 sample' : `${n} samples`);

const asked = (n: number, what: string) => (n > 0 ? `${samples(n)} to ${what}` : `To ${what}`);

export function standing(report: TodayReport, role: Role): { status: Status; words: string } {
  switch (report.state) {
    case 'in-review':
      if (!can(role, 'reading.work')) return { status: 'waiting', words: 'Not confirmed yet' };
      return { status: 'needs-you', words: asked(report.samples, can(role, 'reading.decide') ? 'confirm' : 'review') };
    case 'unreadable':
      return { status: 'failed', words: 'Could not be read' };
    case 'not-soil':
      return { status: 'failed', words: 'Not a soil report' };
    case 'reading':
      return {
        status: 'working',
        words: report.pages ? `Being read, page ${report.pagesRead} of ${report.pages}` : 'Being read',
      };
    default:
      return { status: 'waiting', words: report.waitingLong ? 'Still waiting to be read' : 'Waiting to be read' };
  }
}

type WaitingReportsProps = { siteId: string; role: Role; reports: readonly TodayReport[]; more: number };

export function WaitingReports({ siteId, role, reports, more }: WaitingReportsProps) {
  return (
    <>
      <ul className="border-y border-horizon-5">
        {reports.map((report) => {
          const { status, words } = standing(report, role);
          return (
            <li key={report.id} className="border-b border-horizon-5 py-3 last:border-0">
              <p className="flex flex-wrap items-baseline gap-x-4">
                <Link
                  href={`/sites/${siteId}/reports/${report.id}`}
                  className="text-link inline-flex min-h-8 min-w-0 items-center font-semibold"
                >
                  <span className="min-w-0 break-all">{report.fileName ?? 'Report typed in by hand'}</span>
                </Link>
                <StatusWord status={status}>{words}</StatusWord>
                <span className="text-sm text-clay">sent {inWords(report.uploadedAt.slice(0, 10))}</span>
              </p>
              {report.refusal && can(role, 'reading.work') ? (
                <p className="max-w-measure text-clay">{report.refusal}</p>
              ) : null}
              {report.waitingLong ? (
                <p className="max-w-measure text-clay">
                  The file is safe. The process that reads may not be running; it takes the file up when it is.
                </p>
              ) : null}
            </li>
          );
        })}
      </ul>
      {more > 0 ? (
        <p className="pt-2">
          <Link href={`/sites/${siteId}/reports`} className="text-link inline-flex min-h-(--target) items-center">
            {more} more in the reports of this site
          </Link>
        </p>
      ) : null}
    </>
  );
}

/** "36 of 40 files sent at once are ready to review": in one line, since the list below shows only the first few. */
export function WaitingBatches({ siteId, batches }: { siteId: string; batches: readonly BatchHead[] }) {
  return batches.map(({ id, counts }) => {
    const under = counts.beingRead > 0 ? `${counts.beingRead} still being read` : '';
    const missing = counts.missing > 0 ? `${counts.missing} not here yet` : '';
    return (
      <p key={id} className="pb-2">
        <Link
          href={`/sites/${siteId}/reports/batches/${id}`}
          className="text-link inline-flex min-h-(--target) items-center font-semibold"
        >
          {counts.toReview} of {counts.files} files sent at once are ready to review
        </Link>
        <span className="ml-3 text-clay">{[under, missing].filter((part) => part !== '').join(', ')}</span>
      </p>
    );
  });
}
