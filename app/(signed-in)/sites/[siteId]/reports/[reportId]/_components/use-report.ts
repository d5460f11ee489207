'use client';

import { useCallback, useRef } from 'react';
import type { Report } from '@/lib/schemas/reports';
import type { Review, ReviewRow, ReviewSample } from '@/lib/schemas/review';
import type { Problem } from '@/lib/ui/api';
import { useApi } from '@/lib/ui/use-api';
import { hasReview, isWaiting } from './report-words';
import { withRows } from './review-edits';

/** Asked often while the reader works, seldom while another person may be mending the same rows. */
const WHILE_READING_MS = 2_100;
const WHILE_REVIEWED_MS = 20_000;

export type LiveReport = {
  readonly report: Report;
  readonly review: Review | null;
  readonly problem: Problem | undefined;
  readonly refresh: () => Promise<void>;
  /** Shows rows as the server just answered them, and asks for the rest anew. */
  readonly showRows: (rows: readonly ReviewRow[]) => void;
  readonly showSample: (sample: Omit<ReviewSample, 'sameAs' | 'candidates'>) => void;
};

type First = { report: Report; review: Review | null };

/** State of the report and, once there are rows, everything beside the page. Both are kept fresh. */
export function useReport(path: string, first: First): LiveReport {
  const reportAnswer = useApi<Report>(path, {
    fallback: first.report,
    refreshMs: (latest) => (isWaiting((latest ?? first.report).state) ? WHILE_READING_MS : 0),
  });
  const asked = reportAnswer.data ?? first.report;
  const reviewAnswer = useApi<Review>(hasReview(asked.state) ? `${path}/review` : null, {
    ...(first.review ? { fallback: first.review } : {}),
    // Before the first answer of its own nothing is known here, so it asks.
    refreshMs: (latest) => (latest && latest.report.state !== 'in-review' ? 0 : WHILE_REVIEWED_MS),
  });
  const review = hasReview(asked.state) ? (reviewAnswer.data ?? null) : null;
  const report = review && review.report.version >= asked.version ? review.report : asked;

  const latest = useRef(review);
  latest.current = review;
  const { reload: reloadReport } = reportAnswer;
  const { reload: reloadReview } = reviewAnswer;
  const show = useCallback(
    (change: (now: Review) => Review) => {
      if (!latest.current) return;
      latest.current = change(latest.current);
      void reloadReview(latest.current);
    },
    [reloadReview],
  );
  return {
    report,
    review,
    problem: reviewAnswer.problem ?? reportAnswer.problem,
    refresh: async () => {
      await Promise.all([reloadReport(), reloadReview()]);
    },
    showRows: (rows) => show((now) => withRows(now, rows)),
    showSample: (sample) =>
      show((now) => ({
        ...now,
        samples: now.samples.map((one) =>
          one.id === sample.id && sample.version >= one.version ? { ...one, ...sample } : one,
        ),
      })),
  };
}
