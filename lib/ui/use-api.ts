'use client';

import useSWR, { useSWRConfig } from 'swr';
import { apiPath, callApi, type Problem } from './api';

class ProblemError extends Error {
  constructor(readonly problem: Problem) {
    super(problem.detail);
  }
}

async function fetcher<T>(path: string): Promise<T> {
  const result = await callApi<T>(path);
  if (!result.ok) throw new ProblemError(result.problem);
  return result.data;
}

export type UseApi<T> = {
  data: T | undefined;
  problem: Problem | undefined;
  loading: boolean;
  /** Asks again; with a value, shows that value at once and then asks. */
  reload: (next?: T) => Promise<void>;
};

export type UseApiOptions<T> = {
  /** What the server already rendered, so that the first paint needs no request. */
  fallback?: T;
  /** Ask again every so many milliseconds while it returns a number above 0 (a report being read, say). */
  refreshMs?: number | ((latest: T | undefined) => number);
};

/** Reads a route and keeps it fresh. A null path asks nothing. The last good answer stays while a later one fails. */
export function useApi<T>(path: string | null, { fallback, refreshMs = 0 }: UseApiOptions<T> = {}): UseApi<T> {
  const key = path === null ? null : apiPath(path);
  const { cache } = useSWRConfig();
  // What an earlier visit left behind is shown before the fallback, so it must not be taken for fresh.
  const kept = key !== null && cache.get(key)?.data !== undefined;
  const { data, error, isLoading, mutate } = useSWR<T, unknown>(key, fetcher<T>, {
    ...(fallback === undefined ? {} : { fallbackData: fallback }),
    refreshInterval: typeof refreshMs === 'number' ? refreshMs : (latest) => refreshMs(latest),
    revalidateOnMount: fallback === undefined || kept,
    // callApi has already tried again where trying again is safe.
    shouldRetryOnError: false,
  });
  return {
    data,
    problem: error instanceof ProblemError ? error.problem : undefined,
    loading: isLoading,
    reload: async (next) => {
      await (next === undefined ? mutate() : mutate(next, { revalidate: true }));
    },
  };
}
