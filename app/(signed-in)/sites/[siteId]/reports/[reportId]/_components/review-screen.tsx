'use client';

import { type ReactNode, useEffect, useRef, useState } from 'react';
import { can } from '@/lib/access/table';
import type { Report } from '@/lib/schemas/reports';
import type { Blocker, Review } from '@/lib/schemas/review';
import { Button } from '@/lib/ui/actions/button';
import type { Problem } from '@/lib/ui/api';
import { Notice } from '@/lib/ui/feedback/notice';
import type { GridCounts } from '@/lib/ui/grid/types';
import { Advice } from './advice';
import { NextOfBatch } from './batch-strip';
import { ConfirmBar } from './confirm-bar';
import { ConfirmedNotice } from './confirmed-notice';
import { depthUnit } from './depth-units';
import { ReadWithMemory } from './read-with-memory';
import { sampleFieldId } from './sample-card';
import { SamplesStrip } from './samples-strip';
import type { ReportScreenProps } from './screen-props';
import type { LiveReport } from './use-report';
import { ValuesPane } from './values-pane';

const NONE_OPEN: GridCounts = { saving: 0, failed: 0, conflicts: 0, invalid: 0 };

type ScreenProps = ReportScreenProps & { path: string; live: LiveReport; review: Review; report: Report };

/** Samples above, the page beside its values, the confirmation below. */
export function ReviewScreen({ siteId, role, units, today, path, live, review, report, place: batch }: ScreenProps) {
  const readOnly = report.state !== 'in-review';
  const [counts, setCounts] = useState(NONE_OPEN);
  const [separate, setSeparate] = useState<ReadonlySet<string>>(new Set());
  const [faster, setFaster] = useState<Problem | null>(null);
  /** This person confirmed, or asked to see what another one confirmed: the answer takes the focus. */
  const [settled, setSettled] = useState(false);
  const [goTo, setGoTo] = useState<{ rowId: string; key: number } | null>(null);
  const afterwards = async (then?: () => void) => {
    setSettled(true);
    await live.refresh();
    then?.();
  };
  const place = { path, review, live, readOnly };
  const setSeparateFor = (id: string, on: boolean) =>
    setSeparate((now) => new Set([...now].filter((one) => one !== id).concat(on ? [id] : [])));
  const show = (blocker: Blocker) => {
    if (blocker.rowId) return setGoTo((now) => ({ rowId: blocker.rowId ?? '', key: (now?.key ?? 0) + 1 }));
    const field = blocker.code === 'no-day' ? 'day' : blocker.code === 'no-plot' ? 'plot' : 'card';
    document.getElementById(sampleFieldId(blocker.reportSampleId ?? '', field))?.focus();
  };
  return (
    <>
      <div className="page-wrap max-w-[110rem]! grid gap-4 pb-4 empty:hidden">
        {faster ? <Faster problem={faster} onShow={() => void afterwards(() => setFaster(null))} /> : null}
        {report.state === 'confirmed' ? (
          <TakesFocus when={settled && !batch}>
            <ConfirmedNotice siteId={siteId} review={review} report={report} />
          </TakesFocus>
        ) : null}
        {report.state === 'confirmed' && batch ? <NextOfBatch siteId={siteId} place={batch} focus={settled} /> : null}
        {report.state === 'set-aside' ? (
          <Notice title="Set aside">
            Nothing of it counts. File and rows are kept; an owner or adviser can bring it back.
          </Notice>
        ) : null}
        {report.state === 'in-review' && report.withdrawnReason && !faster ? (
          <Notice tone="look" title="The confirmation was withdrawn">
            {report.withdrawnReason}
          </Notice>
        ) : null}
        {report.state === 'in-review' ? <ReadWithMemory siteId={siteId} review={review} /> : null}
        {report.warnings.length > 0 && report.state === 'in-review' ? (
          <Notice tone="look" title="What the reader noticed">
            <ul>
              {report.warnings.map((warning) => (
                <li key={`${warning.code} ${warning.sentence}`}>{warning.sentence}</li>
              ))}
            </ul>
          </Notice>
        ) : null}
      </div>
      <SamplesStrip
        {...place}
        report={report}
        unit={depthUnit(units)}
        today={today}
        separate={separate}
        onSeparate={setSeparateFor}
      />
      <ValuesPane {...place} report={report} goTo={goTo} onCounts={setCounts} />
      <Advice review={review} />
      {report.state === 'in-review' ? (
        <ConfirmBar
          path={path}
          review={review}
          decides={can(role, 'reading.decide')}
          counts={counts}
          separate={separate}
          onShow={show}
          onConfirmed={() => afterwards()}
          onFaster={setFaster}
          refresh={live.refresh}
        />
      ) : null}
    </>
  );
}

/** Holds the focus once its content is what was just asked for; the button that asked is gone by then. */
function TakesFocus({ when, children, ...rest }: { when: boolean; children: ReactNode; 'data-testid'?: string }) {
  const box = useRef<HTMLDivElement>(null);
  useEffect(() => {
    if (!when) return;
    box.current?.focus({ preventScroll: true });
    box.current?.scrollIntoView({ block: 'center' });
  }, [when]);
  return (
    <div ref={box} tabIndex={-1} {...rest}>
      {children}
    </div>
  );
}

/** Two confirmed at once: who was first, and the way to what they confirmed. */
function Faster({ problem, onShow }: { problem: Problem; onShow: () => void }) {
  return (
    <TakesFocus when data-testid="faster">
      <Notice
        tone="look"
        title={problem.title}
        live
        action={
          <Button look="quiet" onClick={onShow}>
            Show it as it stands now
          </Button>
        }
      >
        {problem.detail} Yours was not counted a second time, and nothing is doubled.
      </Notice>
    </TakesFocus>
  );
}
