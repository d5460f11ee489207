'use client';

import { FileText, Rows3 } from 'lucide-react';
import { useEffect, useId, useMemo, useRef, useState } from 'react';
import type { Report } from '@/lib/schemas/reports';
import type { Review } from '@/lib/schemas/review';
import { Button } from '@/lib/ui/actions/button';
import { buttonClass } from '@/lib/ui/actions/button-style';
import { Segmented } from '@/lib/ui/actions/segmented';
import { cx } from '@/lib/ui/cx';
import { SelectField } from '@/lib/ui/fields/select-field';
import { Grid } from '@/lib/ui/grid/grid';
import type { GridCounts, GridFocusRequest } from '@/lib/ui/grid/types';
import { useLatest } from '@/lib/ui/grid/use-latest';
import { PageView } from '@/lib/ui/page-view/page-view';
import { CONFIRM_ID } from './confirm-bar';
import { originalHref, sourceOf } from './page-source';
import { RemovedRows } from './removed-rows';
import { reportTitle } from './report-words';
import { columnsFor, marksOf, sampleLabel, stableOrder, toGridRow } from './review-rows';
import type { LiveReport } from './use-report';
import { useRowSaves } from './use-row-saves';
import { UsualRows } from './usual-rows';

type PaneProps = {
  path: string;
  review: Review;
  live: LiveReport;
  readOnly: boolean;
  report: Report;
  goTo: { rowId: string; key: number } | null;
  onCounts: (counts: GridCounts) => void;
};

const ALL = 'all';
const MOST_TABS = 5;

/** The page beside its values. Below the width of a tablet one of them is shown at a time. */
export function ValuesPane({ path, review, live, readOnly, report, goTo, onCounts }: PaneProps) {
  const headingId = useId();
  const saves = useRowSaves({ path, review, live });
  const [sampleId, setSampleId] = useState(ALL);
  const [focusedRow, setFocusedRow] = useState<string | null>(null);
  const [request, setRequest] = useState<GridFocusRequest | null>(null);
  const [side, setSide] = useState<'values' | 'page'>('values');
  const pane = useRef<HTMLElement>(null);
  const source = sourceOf(path, report);
  const noFile = source.kind === 'none';

  const { rows, marks, columns } = useShown(review, readOnly, sampleId);

  const focusRow = (rowId: string, columnId?: string) => {
    const row = review.rows.find((one) => one.id === rowId);
    if (sampleId !== ALL && row && row.reportSampleId !== sampleId) setSampleId(ALL);
    setSide('values');
    setRequest((now) => ({ rowId, ...(columnId ? { columnId } : {}), key: Number(now?.key ?? 0) + 1 }));
  };
  const latestFocus = useLatest(focusRow);
  const latestRows = useLatest(review.rows);
  useEffect(() => {
    if (!goTo) return;
    const row = latestRows.current.find((one) => one.id === goTo.rowId);
    latestFocus.current(goTo.rowId, row?.analyte === null ? 'analyte' : 'value');
  }, [goTo, latestFocus, latestRows]);
  const addRow = async () => {
    const near = review.rows.find((row) => row.id === focusedRow)?.reportSampleId;
    const target = sampleId === ALL ? (near ?? review.samples[0]?.id) : sampleId;
    if (!target) return;
    const added = await saves.add(target);
    if (added) focusRow(added, 'analyte');
  };
  const turn = () => {
    const next = side === 'values' ? 'page' : 'values';
    setSide(next);
    if (next === 'values' && focusedRow) focusRow(focusedRow, 'value');
    else requestAnimationFrame(() => pane.current?.scrollIntoView({ block: 'start' }));
  };

  return (
    <section ref={pane} aria-labelledby={headingId} className="border-t border-horizon-5 bg-white py-5">
      <div
        className={cx(
          'page-wrap max-w-[110rem]! grid items-start gap-x-6',
          !noFile && 'lg:grid-cols-[minmax(0,5fr)_minmax(0,7fr)]',
        )}
      >
        {noFile ? null : (
          <div className={cx('min-w-0 lg:sticky lg:top-2', side === 'values' && 'max-lg:hidden')}>
            <PageView
              source={source}
              fileName={reportTitle(report)}
              marks={marks}
              highlightedRowId={focusedRow}
              onPick={(rowId) => focusRow(rowId, 'value')}
              {...originalHref(path, report)}
            />
          </div>
        )}
        <div className={cx('grid min-w-0 gap-3', side === 'page' && !noFile && 'max-lg:hidden')}>
          <div className="flex flex-wrap items-end justify-between gap-x-6 gap-y-1">
            <h2 id={headingId} className="text-xl">
              {readOnly ? 'Values' : noFile ? 'Type the values in' : 'Check the values'}
            </h2>
            {noFile ? (
              <p className="text-sm text-clay">Entered by hand: there is no file behind these values.</p>
            ) : null}
          </div>
          <SampleChoice review={review} value={sampleId} onChange={setSampleId} />
          <Grid
            labelledBy={headingId}
            columns={columns}
            rows={rows}
            readOnly={readOnly}
            onEdit={saves.onEdit}
            onFocusCell={(rowId) => setFocusedRow(rowId)}
            focusRequest={request}
            onCounts={onCounts}
            emptyText="No rows yet. Add one for each value on the page."
            {...(readOnly
              ? {}
              : {
                  onAddRow: () => void addRow(),
                  onRemoveRows: (ids: readonly string[]) => void saves.stepAll(ids, 'remove'),
                  onRestoreRows: (ids: readonly string[]) => void saves.stepAll(ids, 'restore'),
                  onAcceptDoubt: ({ rowId }: { rowId: string }) => void saves.step(rowId, 'accept'),
                })}
          />
          {readOnly ? null : (
            <UsualRows
              review={review}
              sampleId={sampleId === ALL ? null : sampleId}
              onAdd={saves.add}
              onDone={focusRow}
            />
          )}
          <RemovedRows review={review} readOnly={readOnly} onRestore={(rowId) => void saves.step(rowId, 'restore')} />
        </div>
      </div>
      {noFile ? null : (
        <div className="pointer-events-none sticky bottom-[calc(var(--bar-bottom)+0.5rem)] z-30 mt-3 flex justify-between gap-3 px-4 md:bottom-24 lg:hidden">
          {readOnly || side === 'page' ? null : (
            <a
              href={`#${CONFIRM_ID}`}
              className={cx(buttonClass('quiet'), 'pointer-events-auto shadow-lift md:hidden')}
            >
              Go to the end
            </a>
          )}
          <Button
            className="pointer-events-auto ml-auto shadow-lift"
            icon={
              side === 'values' ? (
                <FileText aria-hidden="true" className="size-5" />
              ) : (
                <Rows3 aria-hidden="true" className="size-5" />
              )
            }
            onClick={turn}
          >
            {side === 'values' ? 'See the page' : 'Back to the values'}
          </Button>
        </div>
      )}
    </section>
  );
}

function useShown(review: Review, readOnly: boolean, sampleId: string) {
  const kept = useRef<readonly string[]>([]);
  const sampleIds = review.samples.map((sample) => sample.id);
  const order = stableOrder(review.rows, sampleIds, kept.current);
  kept.current = order;
  const key = order.join(' ');
  // biome-ignore lint/correctness/useExhaustiveDependencies: the order is a new array each time; its words are what counts
  return useMemo(() => {
    const names = new Map(review.samples.map((sample) => [sample.id, sampleLabel(sample)]));
    const byId = new Map(review.rows.map((row) => [row.id, row]));
    const shown = order.flatMap((id) => {
      const row = byId.get(id);
      return row && (sampleId === ALL || row.reportSampleId === sampleId) ? [row] : [];
    });
    const several = review.samples.length > 1 && sampleId === ALL;
    return {
      rows: shown.map((row) => toGridRow(row, several ? names.get(row.reportSampleId) : undefined)),
      marks: marksOf(
        review.rows,
        shown.map((row) => row.id),
        review,
      ),
      columns: columnsFor(review.rows, readOnly),
    };
  }, [review, readOnly, sampleId, key]);
}

function SampleChoice({
  review,
  value,
  onChange,
}: {
  review: Review;
  value: string;
  onChange: (next: string) => void;
}) {
  if (review.samples.length < 2) return null;
  const count = (id: string) =>
    review.rows.filter((row) => row.state !== 'removed' && (id === ALL || row.reportSampleId === id)).length;
  const options = [
    { value: ALL, label: `All samples (${count(ALL)})` },
    ...review.samples.map((one) => ({ value: one.id, label: `${sampleLabel(one)} (${count(one.id)})` })),
  ];
  if (review.samples.length > MOST_TABS) {
    return (
      <SelectField
        name="shown-sample"
        label="Values of"
        options={options}
        value={value}
        onChange={(event) => onChange(event.currentTarget.value)}
      />
    );
  }
  return <Segmented label="Values of which sample" options={options} value={value} onChange={onChange} />;
}
