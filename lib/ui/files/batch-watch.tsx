'use client';

import { useEffect, useRef } from 'react';
import type { BatchHead, BatchList } from '@/lib/schemas/batches';
import { useAnnounce } from '../feedback/announce';
import { useApi } from '../use-api';
import { batchOf, counted } from './upload-item';
import { useUploads } from './use-uploads';

const ASK_EVERY_MS = 2_500;
/** Answers without the batch after which it is done with: each of its files was refused, or somebody has gone through all. */
const MISSES = 2;

/** "All 40 files have been gone through: 36 reports to review." */
export function batchSentence({ counts }: Pick<BatchHead, 'counts'>): string {
  const all = counts.files === 1 ? 'The file has' : `All ${counts.files} files have`;
  const rest = [
    counts.toReview > 0 && `${counted(counts.toReview, 'report')} to review`,
    counts.notRead > 0 && `${counts.notRead} could not be read`,
    counts.notTaken > 0 && `${counts.notTaken} not taken`,
  ].filter((part) => part !== false);
  return `${all} been gone through${rest.length > 0 ? `: ${rest.join(', ')}` : ''}.`;
}

/** Says once, wherever on the site the person is by then, that all of a batch is read. */
export function BatchWatch({ siteId }: { siteId: string }) {
  const { items, store, batches } = useUploads(siteId);
  const announce = useAnnounce();
  const misses = useRef(new Map<string, number>());
  const { data } = useApi<BatchList>(batches.length > 0 ? `/sites/${siteId}/batches` : null, {
    refreshMs: batches.length > 0 ? ASK_EVERY_MS : 0,
  });
  const sending = new Set(items.flatMap((item) => batchOf(item)?.batchId ?? []));
  const waited = batches.filter((id) => !sending.has(id)).join();
  useEffect(() => {
    if (!data || waited === '') return;
    for (const id of waited.split(',')) {
      const found = data.batches.find((one) => one.id === id);
      if (!found) {
        const missed = (misses.current.get(id) ?? 0) + 1;
        misses.current.set(id, missed);
        if (missed > MISSES) store.forget(id);
        continue;
      }
      if (found.counts.beingRead + found.counts.missing > 0) continue;
      announce(batchSentence(found), { tone: 'saved' });
      store.forget(id);
    }
  }, [data, waited, store, announce]);
  return null;
}
