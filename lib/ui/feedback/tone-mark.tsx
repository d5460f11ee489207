'use client';

import type { Tone } from './tone';

/** One mark a tone, each with a shape of its own: a square, a flag on a stake, a broken line, a levelled line. */
export function ToneMark({ tone, className }: { tone: Tone; className?: string }) {
  return (
    <svg viewBox="0 0 20 20" className={className} aria-hidden="true" focusable="false" fill="none">
      {marks[tone]}
    </svg>
  );
}

const line = { stroke: 'currentColor', strokeWidth: 2, strokeLinecap: 'round', strokeLinejoin: 'round' } as const;

const marks = {
  info: (
    <>
      <rect x="2.5" y="2.5" width="15" height="15" rx="1" {...line} />
      <path d="M10 9.2v4.6" {...line} />
      <circle cx="10" cy="6" r="1.3" fill="currentColor" />
    </>
  ),
  look: (
    <>
      <path d="M5 18.5V2" {...line} />
      <path d="M5 2.8h11l-3 3.9 3 3.9H5z" {...line} fill="currentColor" />
    </>
  ),
  error: (
    <>
      <circle cx="10" cy="10" r="7.8" {...line} />
      <path d="M6.8 6.8l6.4 6.4M13.2 6.8l-6.4 6.4" {...line} />
    </>
  ),
  saved: (
    <>
      <path d="M2.5 16.5h15" {...line} />
      <path d="M4.5 8.4l3.9 4L16 3.6" {...line} />
    </>
  ),
};
