'use client';

import { useEffect, useRef, useSyncExternalStore } from 'react';
import { isUnderWay, type UploadItem } from './upload-item';
import { UploadStore } from './upload-store';

const stores = new Map<string, UploadStore>();
const NONE: readonly UploadItem[] = [];
const nothingYet = () => NONE;

function storeOf(siteId: string): UploadStore {
  const known = stores.get(siteId);
  if (known) return known;
  const store = new UploadStore(siteId);
  // On the server nobody sends files, and one process serves everybody.
  if (typeof window !== 'undefined') stores.set(siteId, store);
  return store;
}

/** The files on their way to a site. `onReport` hears each time one was kept or read, to ask for fresh lists. */
export function useUploads(siteId: string, onReport?: () => void) {
  const store = storeOf(siteId);
  const items = useSyncExternalStore(store.subscribe, store.snapshot, nothingYet);

  const heard = useRef('');
  const known = items.flatMap(({ id, stage }) =>
    stage.kind === 'kept' || stage.kind === 'settled' ? [`${id} ${stage.report?.state}`] : [],
  );
  const now = known.join();
  useEffect(() => {
    if (now !== heard.current && now !== '') onReport?.();
    heard.current = now;
  }, [now, onReport]);

  const leaving = items.some(isUnderWay);
  useEffect(() => {
    if (!leaving) return;
    const ask = (event: BeforeUnloadEvent) => event.preventDefault();
    window.addEventListener('beforeunload', ask);
    return () => window.removeEventListener('beforeunload', ask);
  }, [leaving]);

  return { items, store, batches: store.batches() };
}
