'use client';

import type { ReactNode } from 'react';
import { cx } from '../cx';

export type Status = 'waiting' | 'working' | 'needs-you' | 'done' | 'failed' | 'off';

const ink: Record<Status, string> = {
  waiting: 'text-clay',
  working: 'text-gley',
  'needs-you': 'text-ochre',
  done: 'text-lichen',
  failed: 'text-iron',
  off: 'text-clay',
};
const line = {
  stroke: 'currentColor',
  strokeWidth: 2,
  strokeLinecap: 'round',
  strokeLinejoin: 'round',
  fill: 'none',
} as const;

/** Each state has a shape of its own: empty, half, flag, full, crossed, dashed. */
const marks: Record<Status, ReactNode> = {
  waiting: <circle cx="8" cy="8" r="5.5" {...line} />,
  working: (
    <>
      <circle cx="8" cy="8" r="5.5" {...line} />
      <path d="M8 2.5a5.5 5.5 0 0 1 0 11z" fill="currentColor" />
    </>
  ),
  'needs-you': (
    <>
      <path d="M4 15V2" {...line} />
      <path d="M4 2.5h9l-2.4 3L13 8.5H4z" {...line} fill="currentColor" />
    </>
  ),
  done: <circle cx="8" cy="8" r="6.5" fill="currentColor" />,
  failed: <path d="M3.5 3.5l9 9M12.5 3.5l-9 9" {...line} strokeWidth={2.6} />,
  off: <circle cx="8" cy="8" r="5.5" {...line} strokeDasharray="2 3" />,
};

/** The word is the message; mark and colour only help the eye along a list. */
export function StatusWord({ status, children, className }: { status: Status; children: string; className?: string }) {
  return (
    <span className={cx('inline-flex items-baseline gap-2 font-semibold', ink[status], className)} data-status={status}>
      <svg viewBox="0 0 16 16" className="size-3.5 flex-none self-center" aria-hidden="true" focusable="false">
        {marks[status]}
      </svg>
      {children}
    </span>
  );
}
