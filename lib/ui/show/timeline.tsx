'use client';

import type { ReactNode } from 'react';

export type TimelineMark = 'sample' | 'spread' | 'note' | 'due';

export type TimelineItem = {
  key: string;
  /** YYYY-MM-DD, for machines. */
  day: string;
  /** As people read it: 3 May 2026. */
  dayLabel: string;
  mark: TimelineMark;
  title: ReactNode;
  children?: ReactNode;
};

const marks: Record<TimelineMark, { word: string; drawing: ReactNode }> = {
  sample: { word: 'Sample', drawing: <circle cx="10" cy="10" r="6" fill="#1D4E63" /> },
  spread: { word: 'Spread', drawing: <path d="M10 3l7.5 13h-15z" fill="#7E2D10" /> },
  note: {
    word: 'Note',
    drawing: <rect x="4.5" y="4.5" width="11" height="11" fill="#FBF7F0" stroke="#5A4E45" strokeWidth="2" />,
  },
  due: {
    word: 'Due',
    drawing: <circle cx="10" cy="10" r="5.5" fill="#FBF7F0" stroke="#1D4E63" strokeWidth="2" strokeDasharray="2 2.4" />,
  },
};

/** What happened to a plot, newest at the surface, down its core. */
export function Timeline({ items, label }: { items: readonly TimelineItem[]; label: string }) {
  return (
    <ol aria-label={label} className="max-w-3xl">
      {items.map((item) => (
        <li key={item.key} className="group relative grid grid-cols-[1.25rem_1fr] gap-x-4 pb-6 last:pb-0">
          <span aria-hidden className="absolute top-3 bottom-0 left-[9px] w-0.5 bg-horizon-3 group-last:hidden" />
          <svg viewBox="0 0 20 20" className="relative mt-0.5 size-5" role="img" aria-label={marks[item.mark].word}>
            {marks[item.mark].drawing}
          </svg>
          <div className="min-w-0">
            <p className="text-sm text-clay">
              <time dateTime={item.day}>{item.dayLabel}</time>
            </p>
            <p className="font-semibold">{item.title}</p>
            {item.children ? <div className="mt-0.5 max-w-measure">{item.children}</div> : null}
          </div>
        </li>
      ))}
    </ol>
  );
}
