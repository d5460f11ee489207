'use client';

import { type ComponentProps, useEffect, useRef } from 'react';
import type { Report } from '@/lib/schemas/reports';
import { useAnnounce } from '@/lib/ui/feedback/announce';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { Skeleton } from '@/lib/ui/feedback/skeleton';
import { BatchStrip } from './batch-strip';
import { NotRead } from './not-read';
import { LoadOwnSheet } from './own-sheet/load-own-sheet';
import { ReadingProgress } from './reading-progress';
import { ReportHead } from './report-head';
import { hasReview, isWaiting } from './report-words';
import { ReviewScreen } from './review-screen';
import type { ReportScreenProps } from './screen-props';
import { useReport } from './use-report';

/** One report in whatever state it is; follows the state as it changes. */
export function ReportScreen(props: ReportScreenProps) {
  const { siteId, role, personId, firstReport, firstReview } = props;
  const path = `/sites/${siteId}/reports/${firstReport.id}`;
  const live = useReport(path, { report: firstReport, review: firstReview });
  const { report, review } = live;
  useSayNewState(report, personId);
  return (
    <>
      <ReportHead path={path} siteId={siteId} report={report} role={role} personId={personId} refresh={live.refresh} />
      {props.place ? <BatchStrip siteId={siteId} place={props.place} /> : null}
      {live.problem ? (
        <div className="page-wrap max-w-[110rem]! pb-4">
          <ProblemNotice problem={live.problem} />
        </div>
      ) : null}
      {isWaiting(report.state) ? <ReadingProgress report={report} siteId={siteId} /> : null}
      {report.state === 'unreadable' || report.state === 'not-soil' ? (
        <NotRead path={path} report={report} role={role} refresh={live.refresh} />
      ) : null}
      {hasReview(report.state) ? (
        review ? (
          <Reviewed {...props} path={path} live={live} review={review} report={report} />
        ) : live.problem ? null : (
          <div className="page-wrap max-w-[110rem]! py-6">
            <Skeleton label="Fetching the values" shape="table" rows={8} />
          </div>
        )
      ) : null}
    </>
  );
}

/** A grower's own sheet has columns to be read before there are rows. */
function Reviewed(props: ComponentProps<typeof ReviewScreen>) {
  const { path, role, live, report } = props;
  const review = <ReviewScreen {...props} />;
  if (report.origin !== 'own-sheet' || report.state !== 'in-review') return review;
  return <LoadOwnSheet path={path} role={role} version={report.version} onImported={live.refresh} otherwise={review} />;
}

/** A state that changed by itself (the reader, another person) is said, and the focus stays where it is. */
function useSayNewState(report: Report, personId: string): void {
  const announce = useAnnounce();
  const before = useRef(report.state);
  const { state, origin, confirmedBy } = report;
  useEffect(() => {
    const was = before.current;
    before.current = state;
    if (was === state) return;
    if (isWaiting(was) && state === 'in-review')
      announce(
        origin === 'own-sheet'
          ? 'The spreadsheet is opened. Say what its columns hold.'
          : 'The report is read. Check its values beside the page.',
      );
    if (isWaiting(was) && (state === 'unreadable' || state === 'not-soil')) announce('The report could not be read.');
    if (state === 'confirmed' && confirmedBy && confirmedBy.id !== personId) {
      announce(`${confirmedBy.name} confirmed this report.`, { tone: 'look' });
    }
  }, [state, origin, confirmedBy, personId, announce]);
}
