'use client';

import { useEffect, useState } from 'react';
import { useLatest } from '../grid/use-latest';
import { fetchFile } from './fetch-file';
import type { FetchedFile, PageViewProps } from './types';

export type FileState =
  | { readonly kind: 'loading' }
  | { readonly kind: 'failed'; readonly reason: 'store-silent' | 'not-allowed' | 'gone' }
  | { readonly kind: 'ready'; readonly bytes: Uint8Array };

/** Loads a file once per address and attempt. */
export function useFile(
  url: string,
  load: PageViewProps['load'] = fetchFile,
): { readonly file: FileState; readonly again: () => void } {
  const [attempt, setAttempt] = useState(0);
  const [got, setGot] = useState<{ key: string; answer: FetchedFile } | null>(null);
  const loader = useLatest(load);
  const key = `${attempt} ${url}`;
  useEffect(() => {
    const stop = new AbortController();
    void loader.current(url, stop.signal).then((answer) => {
      if (!stop.signal.aborted) setGot({ key, answer });
    });
    return () => stop.abort();
  }, [key, url, loader]);
  const again = () => setAttempt((now) => now + 1);
  if (!got || got.key !== key) return { file: { kind: 'loading' }, again };
  if (!got.answer.ok) return { file: { kind: 'failed', reason: got.answer.reason }, again };
  return { file: { kind: 'ready', bytes: got.answer.bytes }, again };
}
