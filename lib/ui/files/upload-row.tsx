'use client';

import { X } from 'lucide-react';
import { useEffect, useState } from 'react';
import { LONG_WAIT_MS } from '@/lib/schemas/reports';
import { Button } from '../actions/button';
import { LinkButton } from '../actions/link-button';
import { ProgressBar } from '../feedback/progress-bar';
import { type Status, StatusWord } from '../feedback/status-word';
import { seenOn } from './seen-on';
import {
  ATTEMPTS,
  isUnderWay,
  megabytes,
  outcomeText,
  readingText,
  sentText,
  shareOf,
  type UploadItem,
  type UploadStage,
} from './upload-item';
import type { UploadStore } from './upload-store';

type Actions = Pick<UploadStore, 'cancel' | 'retry' | 'sendAsRevision' | 'dismiss'>;

export type UploadRowProps = {
  readonly item: UploadItem;
  readonly store: Actions;
  readonly reportHref: (reportId: string) => string;
  readonly mayType: string;
};

export function UploadRow({ item, store, reportHref, mayType }: UploadRowProps) {
  const { file, stage } = item;
  const bar = barOf(item);
  const mayLeave = !isUnderWay(item) && stage.kind !== 'kept';
  return (
    <div className="relative grid gap-1.5 px-4 py-3" data-stage={stage.kind}>
      {mayLeave ? (
        <button
          type="button"
          className="absolute top-0.5 right-0.5 grid size-(--target) place-items-center rounded-sm text-clay hover:bg-silt hover:text-humus"
          aria-label={`Take ${file.name} off this list`}
          onClick={() => store.dismiss(item.id)}
        >
          <X aria-hidden className="size-5" />
        </button>
      ) : null}
      {bar ? (
        <ProgressBar label={file.name} percent={bar.percent} valueText={bar.text} />
      ) : (
        <p className="flex flex-wrap items-baseline gap-x-4 pr-10">
          <span className="min-w-0 font-semibold break-all">{file.name}</span>
          <StatusWord status={markOf(stage)}>{wordOf(stage)}</StatusWord>
        </p>
      )}
      <p className="text-sm text-clay">
        {item.plotName === null ? 'To the site' : `To ${item.plotName}`}, {megabytes(file.size)}
        {item.asRevision ? ', as a new revision' : ''}
      </p>
      <Said stage={stage} />
      <div className="flex flex-wrap gap-2 empty:hidden">
        <Ways item={item} store={store} reportHref={reportHref} mayType={mayType} />
      </div>
    </div>
  );
}

function Said({ stage }: { stage: UploadStage }) {
  const slow = useSlow(stage);
  if (stage.kind === 'refused') return <p className="max-w-measure">{stage.detail}</p>;
  if (stage.kind === 'cancelled') {
    return <p className="max-w-measure">If it had arrived already, it stands among the reports.</p>;
  }
  if (stage.kind === 'seen-before') {
    return (
      <p className="max-w-measure">
        This very file was sent on {seenOn(stage.uploadedAt)}; it is not kept twice. Open that report, or send the file
        once more as a new revision of it.
      </p>
    );
  }
  if (stage.kind === 'settled' && stage.report.refusal) {
    return <p className="max-w-measure">{stage.report.refusal.sentence}</p>;
  }
  if (stage.kind === 'kept' && stage.unheard) {
    return (
      <p className="max-w-measure">
        The file is kept. Loamline does not answer just now; what became of it shows here as soon as it does.
      </p>
    );
  }
  if (stage.kind === 'kept' && slow) {
    return (
      <p className="max-w-measure" role="status">
        The file is kept, but the reader has not begun. Nothing is lost: it is read as soon as the reader is back. You
        can leave this page.
      </p>
    );
  }
  return null;
}

/** True once a kept file has not moved for a while. */
function useSlow(stage: UploadStage): boolean {
  const since = stage.kind === 'kept' && stage.report?.state !== 'reading' ? stage.heardAt : null;
  const [slow, setSlow] = useState(false);
  useEffect(() => {
    setSlow(false);
    if (since === null) return;
    const timer = setTimeout(() => setSlow(true), Math.max(0, since + LONG_WAIT_MS - Date.now()));
    return () => clearTimeout(timer);
  }, [since]);
  return slow;
}

function Ways({ item, store, reportHref, mayType }: UploadRowProps) {
  const { stage, file, id } = item;
  const name = <span className="sr-only"> {file.name}</span>;
  if (isUnderWay(item)) {
    return (
      <Button look="quiet" onClick={() => store.cancel(id)}>
        Stop sending{name}
      </Button>
    );
  }
  switch (stage.kind) {
    case 'seen-before':
      return (
        <>
          <LinkButton href={reportHref(stage.reportId)}>Open that report</LinkButton>
          <Button look="quiet" onClick={() => store.sendAsRevision(id)}>
            Send as a new revision
          </Button>
        </>
      );
    case 'settled':
      return (
        <LinkButton href={reportHref(stage.reportId)} look={stage.report.state === 'in-review' ? 'primary' : 'quiet'}>
          {stage.report.state === 'in-review' ? reviewLabel(stage.report.samples.all) : `Open ${file.name}`}
        </LinkButton>
      );
    case 'refused':
    case 'cancelled':
      return stage.kind === 'cancelled' || stage.mayRetry ? (
        <Button look="quiet" onClick={() => store.retry(id)}>
          Send{name} again
        </Button>
      ) : (
        <LinkButton look="quiet" href={mayType}>
          Type the report in
        </LinkButton>
      );
    default:
      return null;
  }
}

export const reviewLabel = (samples: number): string =>
  samples === 0 ? 'Review the report' : samples === 1 ? 'Review 1 sample' : `Review ${samples} samples`;

function barOf(item: UploadItem): { text: string; percent: number | undefined } | null {
  const { stage } = item;
  const share = shareOf(item);
  const percent = share === null ? undefined : share * 100;
  if (stage.kind === 'queued') return { text: 'waiting to be sent', percent: 0 };
  if (stage.kind === 'pausing')
    return { text: `connection lost, try ${stage.attempt + 1} of ${ATTEMPTS} follows`, percent: 0 };
  if (stage.kind === 'kept') return { text: readingText(stage.report), percent };
  if (stage.kind !== 'sending') return null;
  const again = stage.attempt > 1 ? `, try ${stage.attempt} of ${ATTEMPTS}` : '';
  // All bytes gone and no answer yet: the server looks at the file.
  const text =
    stage.sent >= stage.total && stage.sent > 0 ? 'sent, being checked' : `${sentText(stage.sent, stage.total)} sent`;
  return { text: `${text}${again}`, percent };
}

function markOf(stage: UploadStage): Status {
  if (stage.kind === 'settled') {
    if (stage.report.state === 'in-review') return 'needs-you';
    return stage.report.state === 'confirmed' ? 'done' : 'failed';
  }
  if (stage.kind === 'seen-before') return 'needs-you';
  return stage.kind === 'cancelled' ? 'off' : 'failed';
}

function wordOf(stage: UploadStage): string {
  if (stage.kind === 'settled') return outcomeText(stage.report);
  if (stage.kind === 'seen-before') return 'Sent before';
  if (stage.kind === 'refused') return stage.title;
  return stage.kind === 'cancelled' ? 'Stopped' : '';
}
