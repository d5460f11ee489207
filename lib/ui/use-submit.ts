'use client';

import { useCallback, useRef, useState } from 'react';
import { type ApiResult, type CallOptions, callApi, type Problem } from './api';

export type UseSubmit<T> = {
  send: (path: string, options?: CallOptions) => Promise<ApiResult<T>>;
  busy: boolean;
  problem: Problem | undefined;
  /** Sentences by field name, from the problem; empty when there is none. */
  errors: Record<string, string>;
  clear: () => void;
};

const NO_ERRORS: Record<string, string> = {};

/** One write at a time: while one is under way a second press joins it instead of sending twice. */
export function useSubmit<T = unknown>(): UseSubmit<T> {
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<Problem>();
  const running = useRef<Promise<ApiResult<T>> | null>(null);

  const send = useCallback((path: string, options: CallOptions = {}) => {
    if (running.current) return running.current;
    setBusy(true);
    setProblem(undefined);
    const call = callApi<T>(path, { method: 'POST', ...options }).then((result) => {
      running.current = null;
      setBusy(false);
      if (!result.ok) setProblem(result.problem);
      return result;
    });
    running.current = call;
    return call;
  }, []);

  const clear = useCallback(() => setProblem(undefined), []);
  return { send, busy, problem, errors: problem?.fields ?? NO_ERRORS, clear };
}
