'use client';

import { useRef, useState } from 'react';
import { type ReviewSample, reviewSampleAnswerSchema } from '@/lib/schemas/review';
import { type ApiResult, callApi, type Problem } from '@/lib/ui/api';
import type { LiveReport } from './use-report';

export type SampleChange = Partial<
  Pick<ReviewSample, 'plotId' | 'takenOn' | 'cores' | 'composite' | 'leftOutReason'> & {
    depthFromCm: number | null;
    depthToCm: number | null;
  }
>;

/** Saves one sample field by field, one after the other, so that its own steps never look like somebody else's. */
export function useSampleSaves(path: string, sample: ReviewSample, live: LiveReport) {
  const [problem, setProblem] = useState<Problem>();
  const [busy, setBusy] = useState(0);
  const version = useRef(sample.version);
  version.current = Math.max(version.current, sample.version);
  const queue = useRef<Promise<unknown>>(Promise.resolve());

  const send = (method: 'PATCH' | 'PUT', at: string, body: object): Promise<ApiResult<unknown>> => {
    const run = async () => {
      const result = await callApi<unknown>(at, { method, body: { version: version.current, ...body } });
      setBusy((now) => now - 1);
      if (result.ok) {
        const saved = reviewSampleAnswerSchema.parse(result.data);
        version.current = Math.max(version.current, saved.version);
        setProblem(undefined);
        live.showSample(saved);
      } else {
        setProblem(result.problem);
        if (result.problem.status === 409) await live.refresh();
      }
      return result;
    };
    setBusy((now) => now + 1);
    const next = queue.current.then(run);
    queue.current = next;
    return next;
  };

  const at = `${path}/samples/${sample.id}`;
  return {
    busy: busy > 0,
    problem,
    save: (change: SampleChange) => send('PATCH', at, change),
    setSameAs: (sameAsId: string | null) => send('PUT', `${at}/same-as`, { sameAsId }),
  };
}

export type SampleSaves = ReturnType<typeof useSampleSaves>;
