'use client';

import { useEffect } from 'react';
import type { Batch, BatchSamples } from '@/lib/schemas/batches';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { ProgressBar } from '@/lib/ui/feedback/progress-bar';
import { PageDrop } from '@/lib/ui/files/page-drop';
import { batchOf, counted } from '@/lib/ui/files/upload-item';
import { useUploads } from '@/lib/ui/files/use-uploads';
import { Stretch } from '@/lib/ui/frame/layers';
import { PageTitle } from '@/lib/ui/frame/page-title';
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

const WHILE_MOVING_MS = 1_500;

/** Old years at once: how far every file is, the plots of all samples, and the way into the review. */
export function BatchScreen({ site, first, firstSamples, timeZone, mayWork, mine }: ScreenProps) {
  const home = `/sites/${site.id}`;
  const path = `${home}/batches/${first.id}`;
  const { items, store } = useUploads(site.id);
  const own = items.filter((item) => batchOf(item)?.batchId === first.id);
  const {
    data: batch = first,
    problem,
    reload,
  } = useApi<Batch>(path, {
    fallback: first,
    refreshMs: (latest) => (own.length > 0 || isMoving(latest ?? first) ? WHILE_MOVING_MS : 0),
  });
  const { counts, files } = batch;
  const moving = own.length > 0 || isMoving(batch);
  useEffect(() => {
    if (moving) store.watch(first.id);
  }, [moving, store, first.id]);
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
          {standingWords(counts)}
        </p>
        {mayWork && counts.missing > own.length ? (
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
        <BatchFiles home={home} files={files} sending={own} store={store} mayWork={mayWork} />
      </Stretch>
      <PageDrop
        onFiles={mayWork && counts.missing > own.length ? choose : undefined}
        label="Let go to send what is still missing of this list."
      />
    </>
  );
}

const isAnnounced = (file: Batch['files'][number]): boolean => file.state === 'announced';
