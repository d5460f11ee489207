'use client';

import { Upload } from 'lucide-react';
import { useRouter } from 'next/navigation';
import { useCallback, useEffect, useState } from 'react';
import type { BatchList } from '@/lib/schemas/batches';
import type { ReportList } from '@/lib/schemas/reports';
import { Button } from '@/lib/ui/actions/button';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { Segmented } from '@/lib/ui/actions/segmented';
import { EmptyState } from '@/lib/ui/feedback/empty-state';
import { Notice } from '@/lib/ui/feedback/notice';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { FileButton } from '@/lib/ui/files/file-button';
import { PageDrop } from '@/lib/ui/files/page-drop';
import { ACCEPTED_FILES } from '@/lib/ui/files/upload-item';
import { UploadList } from '@/lib/ui/files/upload-list';
import { useUploads } from '@/lib/ui/files/use-uploads';
import { PageTitle } from '@/lib/ui/frame/page-title';
import { useApi } from '@/lib/ui/use-api';
import { OpenBatches } from './open-batches';
import { OtherWays } from './other-ways';
import { ReportRow, type RowRights } from './report-row';
import { arranged, countsOf, FILTER_WORDS, FILTERS, type Filter, isStuck, someBeingRead } from './report-states';

type InboxProps = RowRights & {
  readonly site: { readonly id: string; readonly name: string };
  readonly timeZone: string;
  readonly today: string;
  readonly plots: readonly { readonly id: string; readonly name: string }[];
  readonly first: ReportList;
  readonly batches: BatchList;
  readonly shown: Filter;
};

const AT_A_TIME = 25;
const WHILE_READING_MS = 2_000;

export function Inbox({ site, timeZone, today, plots, first, batches, shown, ...rights }: InboxProps) {
  const home = `/sites/${site.id}`;
  const {
    data = first,
    problem,
    reload,
  } = useApi<ReportList>(`${home}/reports`, {
    fallback: first,
    refreshMs: (latest) => (someBeingRead((latest ?? first).reports) ? WHILE_READING_MS : 0),
  });
  const [filter, setFilter] = useState(shown);
  const [most, setMost] = useState(AT_A_TIME);
  const refresh = useCallback(() => void reload(), [reload]);
  const { items, store } = useUploads(site.id, refresh);
  const list = arranged(data.reports, filter);
  const counts = countsOf(data.reports);
  const plotNames = new Map(plots.map((plot) => [plot.id, plot.name]));
  const day = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'long', year: 'numeric', timeZone });
  const router = useRouter();
  const send = (files: readonly File[]) => {
    const sent = store.add(files, { plotId: null, plotName: null });
    void sent.then((batchId) => batchId && router.push(`${home}/reports/batches/${batchId}`));
  };
  const choose = (next: Filter) => {
    setFilter(next);
    setMost(AT_A_TIME);
    window.history.replaceState(null, '', next === 'all' ? `${home}/reports` : `${home}/reports?show=${next}`);
  };
  return (
    <>
      <PageTitle
        title="Reports"
        lead={
          rights.mayWork
            ? 'Every report of this site. Nothing of one counts before somebody confirms it.'
            : 'Every report of this site and how far it is.'
        }
        actions={
          rights.mayWork ? (
            <>
              <FileButton
                multiple
                accept={ACCEPTED_FILES}
                icon={<Upload aria-hidden="true" className="size-5" />}
                onFiles={send}
              >
                Upload reports
              </FileButton>
              <LinkButton look="quiet" href={`${home}/reports/new`}>
                Type one in
              </LinkButton>
            </>
          ) : null
        }
      />
      <div className="page-wrap grid gap-4 pb-12">
        {rights.mayWork ? <OtherWays home={home} today={today} onFile={(file) => send([file])} /> : null}
        <ProblemNotice problem={problem} />
        <UploadList
          items={items}
          store={store}
          reportHref={(id) => `${home}/reports/${id}`}
          batchHref={(id) => `${home}/reports/batches/${id}`}
          mayType={`${home}/reports/new`}
        />
        <OpenBatches siteId={site.id} first={batches} timeZone={timeZone} />
        <Stuck first={data} />
        {data.reports.length === 0 ? (
          <EmptyState shape="page" title="No report yet">
            {rights.mayWork
              ? 'Drop a laboratory’s PDF, scan, photograph, data file or workbook anywhere on this page, or pick one with the button. It is read, and its values stand here until you have looked at them beside the page.'
              : 'Reports that are sent in stand here with how far they are.'}
          </EmptyState>
        ) : (
          <>
            <Segmented
              label="Which reports"
              value={filter}
              onChange={choose}
              options={FILTERS.map((value) => ({ value, label: `${FILTER_WORDS[value]} ${counts[value]}` }))}
            />
            <h2 className="sr-only">{FILTER_WORDS[filter]}</h2>
            {list.length === 0 ? <p className="py-4 text-clay">{NONE[filter]}</p> : null}
            <ul aria-label="Reports" className="divide-y divide-horizon-5 border-b border-horizon-5 empty:hidden">
              {list.slice(0, most).map((report) => (
                <li key={report.id}>
                  <ReportRow
                    siteId={site.id}
                    report={report}
                    plotNames={plotNames}
                    sentOn={day.format(new Date(report.uploadedAt))}
                    onChanged={refresh}
                    {...rights}
                  />
                </li>
              ))}
            </ul>
            {list.length > 0 ? (
              <div className="flex flex-wrap items-center gap-x-5 gap-y-3">
                <p className="text-sm text-clay" role="status">
                  {Math.min(most, list.length)} of {list.length} shown
                </p>
                {most < list.length ? (
                  <Button look="quiet" onClick={() => setMost(most + AT_A_TIME)}>
                    Show {Math.min(AT_A_TIME, list.length - most)} more
                  </Button>
                ) : null}
              </div>
            ) : null}
          </>
        )}
      </div>
      <PageDrop onFiles={rights.mayWork ? send : undefined} label={`Let go to send it to ${site.name}.`} />
    </>
  );
}

const NONE: Record<Filter, string> = {
  all: 'Nothing but what was set aside.',
  review: 'Nothing waits to be reviewed.',
  reading: 'Nothing is being read just now.',
  unreadable: 'Everything so far could be read.',
  confirmed: 'Nothing is confirmed yet.',
  'set-aside': 'Nothing was set aside.',
};

/** The reader may be down: said in a sentence, because a bar that stands still says nothing. */
function Stuck({ first }: { first: ReportList }) {
  const [now, setNow] = useState(0);
  useEffect(() => {
    setNow(Date.now());
    const timer = setInterval(() => setNow(Date.now()), 5_000);
    return () => clearInterval(timer);
  }, []);
  const stuck = now === 0 ? 0 : first.reports.filter((report) => isStuck(report, now)).length;
  if (stuck === 0) return null;
  return (
    <Notice
      tone="look"
      live
      title={stuck === 1 ? '1 report is still waiting to be read' : `${stuck} reports are still waiting to be read`}
    >
      The reader seems not to be running, or is busy with others. The files are kept and nothing is lost; each is read
      as soon as the reader is back. You need not send them again.
    </Notice>
  );
}
