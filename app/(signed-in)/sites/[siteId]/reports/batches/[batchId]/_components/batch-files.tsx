'use client';

import Link from 'next/link';
import type { BatchFile } from '@/lib/schemas/batches';
import { Button } from '@/lib/ui/actions/button';
import { ProgressBar } from '@/lib/ui/feedback/progress-bar';
import { StatusWord } from '@/lib/ui/feedback/status-word';
import { batchOf, isUnderWay, megabytes, shareOf, shortText, type UploadItem } from '@/lib/ui/files/upload-item';
import type { UploadStore } from '@/lib/ui/files/upload-store';
import { fileSentence, fileWords } from './batch-words';

type FilesProps = {
  home: string;
  files: readonly BatchFile[];
  /** Those this browser is sending right now. */
  own: readonly UploadItem[];
  /** Until the last of them is through. */
  sending: boolean;
  store: Pick<UploadStore, 'cancel' | 'retry'>;
  mayWork: boolean;
};

/** Every file that was let go, in that order: refused ones stay with their reason. */
export function BatchFiles({ home, files, own, sending, store, mayWork }: FilesProps) {
  const bySpot = new Map(own.map((item) => [batchOf(item)?.fileId, item]));
  return (
    <ol aria-label="Files" className="divide-y divide-horizon-5 border-y border-horizon-5">
      {files.map((file) => {
        const item = bySpot.get(file.id);
        return (
          <li key={file.id} className="grid gap-x-4 py-2 sm:grid-cols-[2.5rem_minmax(0,1fr)]" data-state={file.state}>
            <span className="text-sm text-clay max-sm:hidden sm:pt-2">{file.ordinal}</span>
            <div className="min-w-0">
              {item ? (
                <Sending item={item} store={store} />
              ) : (
                <Kept home={home} file={file} sending={sending} mayWork={mayWork} />
              )}
            </div>
          </li>
        );
      })}
    </ol>
  );
}

type KeptProps = Pick<FilesProps, 'home' | 'sending' | 'mayWork'> & { file: BatchFile };

function Kept({ home, file, sending, mayWork }: KeptProps) {
  const { status, words } = fileWords(file, sending);
  const sentence = fileSentence(file);
  const shown = mayWork || file.report?.state === 'confirmed';
  return (
    <>
      <p className="flex flex-wrap items-baseline gap-x-4">
        {file.report && shown ? (
          <Link
            href={`${home}/reports/${file.report.id}`}
            className="text-link inline-flex min-h-(--target) min-w-0 items-center font-semibold"
          >
            <span className="min-w-0 break-all">{file.fileName}</span>
          </Link>
        ) : (
          <span className="inline-flex min-h-(--target) min-w-0 items-center font-semibold break-all">
            {file.fileName}
          </span>
        )}
        <StatusWord status={status}>{words}</StatusWord>
        <span className="text-sm text-clay">{megabytes(file.bytes)}</span>
      </p>
      {sentence ? <p className="max-w-measure pb-1">{sentence}</p> : null}
    </>
  );
}

function Sending({ item, store }: { item: UploadItem; store: FilesProps['store'] }) {
  const share = shareOf(item);
  const name = <span className="sr-only"> {item.file.name}</span>;
  if (isUnderWay(item)) {
    return (
      <div className="flex flex-wrap items-center gap-x-4">
        <div className="min-w-0 flex-1 basis-64">
          <ProgressBar
            label={item.file.name}
            percent={item.stage.kind === 'queued' ? 0 : share === null ? undefined : share * 100}
            valueText={shortText(item)}
          />
        </div>
        <Button look="plain" size="small" className="min-h-(--target)!" onClick={() => store.cancel(item.id)}>
          Stop{name}
        </Button>
      </div>
    );
  }
  return (
    <div className="flex flex-wrap items-baseline gap-x-4">
      <span className="min-w-0 font-semibold break-all">{item.file.name}</span>
      <StatusWord status={item.stage.kind === 'cancelled' ? 'off' : 'failed'}>{shortText(item)}</StatusWord>
      <Button look="quiet" size="small" className="min-h-(--target)!" onClick={() => store.retry(item.id)}>
        Send{name} again
      </Button>
      {item.stage.kind === 'refused' ? <p className="max-w-measure basis-full">{item.stage.detail}</p> : null}
    </div>
  );
}
