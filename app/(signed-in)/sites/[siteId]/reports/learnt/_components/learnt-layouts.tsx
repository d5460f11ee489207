'use client';

import Link from 'next/link';
import type { LayoutList, LearntLayout } from '@/lib/schemas/learning';
import { ConfirmButton } from '@/lib/ui/actions/confirm-button';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { type ApiResult, callApi } from '@/lib/ui/api';
import { useAnnounce } from '@/lib/ui/feedback/announce';
import { EmptyState } from '@/lib/ui/feedback/empty-state';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { Stretch } from '@/lib/ui/frame/layers';
import { DataTable } from '@/lib/ui/show/data-table';
import { useApi } from '@/lib/ui/use-api';
import { fromWords, laboratoryWords, meaningWords, methodWords, onDay, shapeWords, unitWords } from './learnt-words';

type Props = { siteId: string; first: LayoutList; mayForget: boolean };

export function LearntLayouts({ siteId, first, mayForget }: Props) {
  const home = `/sites/${siteId}`;
  const { data = first, problem, reload } = useApi<LayoutList>(`${home}/layouts`, { fallback: first });
  const announce = useAnnounce();
  const forget = async (layout: LearntLayout): Promise<ApiResult<unknown>> => {
    const result = await callApi(`${home}/layouts/${layout.id}`, { method: 'DELETE' });
    // Somebody else was faster: it is gone either way.
    if (!result.ok && result.problem.status !== 404) return result;
    announce('Forgotten. The next report of this form is read from its page alone.', { tone: 'saved' });
    await reload();
    return { ok: true, status: 200, data: null };
  };
  if (data.layouts.length === 0) {
    return (
      <Stretch title="Forms confirmed so far">
        <ProblemNotice problem={problem} />
        <EmptyState
          shape="table"
          title="Nothing learnt yet"
          action={<LinkButton href={`${home}/reports`}>To the reports</LinkButton>}
        >
          When a report is confirmed, each label of its form is kept with the analyte, method and unit it stood for. The
          next report of that form is read with it, and its rows say on which day you confirmed that.
        </EmptyState>
      </Stretch>
    );
  }
  return (
    <>
      {problem ? (
        <Stretch>
          <ProblemNotice problem={problem} />
        </Stretch>
      ) : null}
      {data.layouts.map((layout, at) => (
        <Stretch
          key={layout.fingerprint}
          title={laboratoryWords(layout)}
          {...(at % 2 === 1 ? { ground: 'white' as const } : {})}
        >
          <OneLayout
            home={home}
            number={at + 1}
            layout={layout}
            {...(mayForget ? { onForget: () => forget(layout) } : {})}
          />
        </Stretch>
      ))}
    </>
  );
}

function OneLayout({
  home,
  number,
  layout,
  onForget,
}: {
  home: string;
  /** Tells two forms of one laboratory apart for those who only hear the page. */
  number: number;
  layout: LearntLayout;
  onForget?: () => Promise<ApiResult<unknown>>;
}) {
  const days = new Set(layout.lessons.map((lesson) => lesson.on));
  const rows = layout.lessons.map((lesson, at) => ({ ...lesson, at }));
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] gap-4">
      <div className="flex flex-wrap items-start justify-between gap-x-8 gap-y-3">
        <p className="max-w-measure text-clay">
          {shapeWords(layout)[0]?.toUpperCase()}
          {shapeWords(layout).slice(1)}. Learnt from {fromWords(layout)}:{' '}
          {layout.reports.slice(0, 5).map((report, index) => (
            <span key={report.reportId}>
              {index === 0 ? '' : ', '}
              <Link className="text-link inline-block py-1 break-all" href={`${home}/reports/${report.reportId}`}>
                {report.fileName ?? 'report'}
              </Link>
            </span>
          ))}
          {layout.reports.length > 5 ? ` and ${layout.reports.length - 5} more` : ''}.
        </p>
        {onForget ? (
          <ConfirmButton
            title={`Forget this form of ${laboratoryWords(layout)}?`}
            sentence="What its labels meant is no longer used. Confirmed results and open reviews stay as they are; the next report you confirm teaches it anew."
            confirmLabel="Forget this layout"
            busyLabel="Forgetting"
            keepLabel="Keep it"
            onConfirm={onForget}
          >
            Forget this layout
          </ConfirmButton>
        ) : null}
      </div>
      <DataTable
        caption={`Labels of ${laboratoryWords(layout)} and what they meant, form ${number}`}
        hideCaption
        rows={rows}
        rowKey={(row) => String(row.at)}
        columns={[
          { key: 'label', head: 'On the page', rowHead: true, cell: (row) => row.label },
          { key: 'analyte', head: 'Means', cell: meaningWords },
          { key: 'method', head: 'Method', cell: methodWords },
          { key: 'unit', head: 'Unit', cell: unitWords },
          ...(days.size > 1
            ? [{ key: 'on', head: 'Confirmed', cell: (row: (typeof rows)[number]) => onDay(row.on) }]
            : []),
        ]}
      />
    </div>
  );
}
