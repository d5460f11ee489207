import type { ReactNode } from 'react';
import type { Problem } from '../api';
import { Notice } from './notice';

/** A refusal of the API, in its own words. */
export function ProblemNotice({ problem, action }: { problem: Problem | undefined; action?: ReactNode }) {
  if (!problem) return null;
  return (
    <Notice tone="error" title={problem.title} live action={action}>
      {problem.detail}
      {problem.reference ? <span className="block text-sm text-clay">Reference: {problem.reference}</span> : null}
    </Notice>
  );
}
