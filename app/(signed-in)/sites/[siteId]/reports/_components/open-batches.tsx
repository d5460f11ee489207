'use client';

import Link from 'next/link';
import type { BatchHead, BatchList } from '@/lib/schemas/batches';
import { StatusWord } from '@/lib/ui/feedback/status-word';
import { counted } from '@/lib/ui/files/upload-item';
import { useApi } from '@/lib/ui/use-api';

const WHILE_MOVING_MS = 4_000;

const isMoving = (batch: BatchHead): boolean => batch.counts.beingRead > 0;

/** "36 to review, 2 being read" */
export function batchStanding({ counts }: Pick<BatchHead, 'counts'>): string {
  const parts = [
    counts.toReview > 0 && `${counts.toReview} to review`,
    counts.beingRead > 0 && `${counts.beingRead} being read`,
    counts.missing > 0 && `${counts.missing} not here yet`,
    counts.notRead > 0 && `${counts.notRead} could not be read`,
  ].filter((part) => part !== false);
  return parts.length > 0 ? parts.join(', ') : 'all gone through';
}

type OpenProps = { siteId: string; first: BatchList; timeZone: string };

/** Many files sent at once that still ask something of somebody, each with the way to its list. */
export function OpenBatches({ siteId, first, timeZone }: OpenProps) {
  const day = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'long', year: 'numeric', timeZone });
  const { data = first } = useApi<BatchList>(`/sites/${siteId}/batches`, {
    fallback: first,
    refreshMs: (latest) => ((latest ?? first).batches.some(isMoving) ? WHILE_MOVING_MS : 0),
  });
  if (data.batches.length === 0) return null;
  return (
    <ul aria-label="Many files at once" className="grid gap-px border border-fallow bg-horizon-5">
      {data.batches.map((batch) => (
        <li key={batch.id} className="flex flex-wrap items-center gap-x-4 bg-white px-4 py-1.5">
          <Link
            href={`/sites/${siteId}/reports/batches/${batch.id}`}
            className="text-link inline-flex min-h-(--target) items-center font-semibold"
          >
            {counted(batch.counts.files, 'file')} sent at once
          </Link>
          <StatusWord status={isMoving(batch) ? 'working' : 'needs-you'}>{batchStanding(batch)}</StatusWord>
          <span className="text-sm text-clay">
            by {batch.createdBy.name}, {day.format(new Date(batch.createdAt))}
          </span>
        </li>
      ))}
    </ul>
  );
}
