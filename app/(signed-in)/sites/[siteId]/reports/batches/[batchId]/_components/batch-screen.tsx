'use client';

import { useRouter } from 'next/navigation';
import { useEffect, useRef, useState } from 'react';
import type { Batch, BatchSamples } from '@/lib/schemas/batches';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { ProgressBar } from '@/lib/ui/feedback/progress-bar';
import { PageDrop } from '@/lib/ui/files/page-drop';
import { batchOf, counted, isUnderWay } from '@/lib/ui/files/upload-item';
import { useUploads } from '@/lib/ui/files/use-uploads';
import { Stretch } from '@/lib/ui/frame/layers';
import { PageTitle } from '@/lib/ui/frame/page-title';
import { useLatest } from '@/lib/ui/grid/use-latest';
import { useApi } from '@/lib/ui/use-api';
import { AssignPlots } from './assign-plots';
import { BatchFiles } from './batch-files';
import { isMoving, percentDone, progressWords, standingWords } from './batch-words';
import { MailSwitch } from './mail-switch';
import { MissingFiles } from './missing-files';

type ScreenProps = {
  site: { id: string; name: string };
  first: Batch;
  firstSamples: BatchSamples | null;
  timeZone: string;
  mayWork: boolean;
  /** Sent by whoever looks at it. */
  mine: boolean;
};

const WHILE_SENDING_MS = 700;
const WHILE_READ_MS = 1_500;

/** Old years at once: how far every file is, the plots of all samples, and the way into the review. */
export function BatchScreen({ site, first, firstSamples, timeZone, mayWork, mine }: ScreenProps) {
  const home = `/sites/${site.id}`;
  const path = `${home}/batches/${first.id}`;
  const { items, store } = useUploads(site.id);
  const own = items.filter((item) => batchOf(item)?.batchId === first.id);
  const sending = own.some(isUnderWay);
  const {
    data: batch = first,
    problem,
    reload,
  } = useApi<Batch>(path, {
    fallback: first,
    refreshMs: (latest) => (isMoving(latest ?? first) ? WHILE_READ_MS : 0),
  });
  const { counts, files } = batch;
  const moving = sending || isMoving(batch);
  const settled = useSettled(sending, reload);
  useEffect(() => {
    if (moving) store.watch(first.id);
  }, [moving, store, first.id]);
  useFreshFrame(moving);
  const next = files.find((file) => file.report?.state === 'in-review')?.report?.id;
  const day = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'long', year: 'numeric', timeZone });
  const readyKey = `${counts.toReview} ${counts.confirmed}`;
  const choose = (chosen: readonly File[]) => store.resume(first.id, files.filter(isAnnounced), chosen);
  return (
    <>
      <PageTitle
        title={`${counted(counts.files, 'file')} at once`}
        above={{ href: `${home}/reports`, label: 'Reports' }}
        lead={`Sent by ${batch.createdBy.name}, ${day.format(new Date(batch.createdAt))}. Nothing of them counts before somebody confirms it.`}
        actions={
          mayWork && next ? (
            <LinkButton href={`${home}/reports/${next}`}>
              {counts.toReview === 1 ? 'Review the report' : `Review ${counts.toReview} one after another`}
            </LinkButton>
          ) : null
        }
      />
      <div className="page-wrap grid gap-4 pb-6">
        <ProblemNotice problem={problem} />
        <ProgressBar label="How far they are" percent={percentDone(counts)} valueText={progressWords(counts)} />
        <p role="status" className="max-w-measure">
          {standingWords(counts, !settled)}
        </p>
        {mayWork && settled && counts.missing > own.length ? (
          <MissingFiles
            path={path}
            missing={files.filter(
              (file) => isAnnounced(file) && !own.some((item) => batchOf(item)?.fileId === file.id),
            )}
            onChosen={choose}
            onLeftOut={() => void reload()}
          />
        ) : null}
        {mine && mayWork && batch.readyAt === null ? (
          <MailSwitch path={path} wanted={batch.mailWanted} onChanged={() => void reload()} />
        ) : null}
      </div>
      {mayWork && firstSamples && (counts.toReview > 0 || firstSamples.samples.length > 0) ? (
        <Stretch title="Which plot is each sample from?" id="plots" ground="white">
          <AssignPlots home={home} path={path} first={firstSamples} moved={readyKey} />
        </Stretch>
      ) : null}
      <Stretch title="Files" id="files">
        <BatchFiles home={home} files={files} own={own} sending={!settled} store={store} mayWork={mayWork} />
      </Stretch>
      <PageDrop
        onFiles={mayWork && settled && counts.missing > own.length ? choose : undefined}
        label="Let go to send what is still missing of this list."
      />
    </>
  );
}

/** False from the first file on its way until the server has been asked after the last: only then is a file missing. */
function useSettled(sending: boolean, reload: () => Promise<void>): boolean {
  const [settled, setSettled] = useState(!sending);
  const latest = useLatest(reload);
  useEffect(() => {
    if (sending) {
      setSettled(false);
      // A clock of its own: the screen is drawn anew with every few bytes, which would put a shared one back each time.
      const timer = setInterval(() => void latest.current(), WHILE_SENDING_MS);
      return () => clearInterval(timer);
    }
    let gone = false;
    void latest.current().then(() => {
      if (!gone) setSettled(true);
    });
    return () => {
      gone = true;
    };
  }, [sending, latest]);
  return settled;
}

/** The count beside “Reports” in the frame is drawn by the server; it is asked anew once nothing moves any more. */
function useFreshFrame(moving: boolean): void {
  const router = useRouter();
  const was = useRef(moving);
  useEffect(() => {
    if (was.current && !moving) router.refresh();
    was.current = moving;
  }, [moving, router]);
}

const isAnnounced = (file: Batch['files'][number]): boolean => file.state === 'announced';
