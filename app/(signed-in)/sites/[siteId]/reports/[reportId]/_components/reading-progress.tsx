'use client';

import type { Report } from '@/lib/schemas/reports';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { Notice } from '@/lib/ui/feedback/notice';
import { ProgressBar } from '@/lib/ui/feedback/progress-bar';

/** Waiting or being read: how far, in pages; the screen goes on by itself when it is done. */
export function ReadingProgress({ report, siteId }: { report: Report; siteId: string }) {
  const { pages, pagesRead, state } = report;
  const percent = state === 'reading' && pages ? (100 * pagesRead) / pages : undefined;
  const valueText =
    state === 'received'
      ? 'waiting for its turn'
      : pages
        ? `page ${Math.min(pages, pagesRead)} of ${pages}`
        : 'opening the file';
  return (
    <div className="page-wrap grid gap-6 py-6">
      {report.waitingLong ? (
        <Notice tone="look" title="This takes longer than usual" live>
          The file is kept. The part of Loamline that reads reports may not be running; whoever runs it can start it
          again. As soon as it runs, this report is read and this page goes on by itself.
        </Notice>
      ) : null}
      <ProgressBar
        label={state === 'received' ? 'Waiting to be read' : 'Reading the report'}
        percent={percent}
        valueText={valueText}
      />
      <p className="max-w-measure text-clay">
        When it is read, its values stand here beside the page, for you to check. You can leave this page meanwhile.
      </p>
      <p>
        <LinkButton look="quiet" href={`/sites/${siteId}/reports`}>
          Go to all reports
        </LinkButton>
      </p>
    </div>
  );
}
