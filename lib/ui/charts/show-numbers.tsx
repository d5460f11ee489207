'use client';

import type { ReactNode } from 'react';

/** The table behind a chart. Works without script; on paper it is always open. */
export function ShowNumbers({ children, label = 'Show numbers' }: { children: ReactNode; label?: string }) {
  return (
    <details className="group">
      <summary className="inline-flex min-h-11 items-center gap-2 text-gley underline decoration-1 underline-offset-4 hover:decoration-[3px] print:hidden">
        <svg width="12" height="12" aria-hidden="true" className="flex-none group-open:rotate-90">
          <path d="M3 1l6 5-6 5z" fill="currentColor" />
        </svg>
        <span className="group-open:hidden">{label}</span>
        <span className="hidden group-open:inline">Hide numbers</span>
      </summary>
      <div className="pt-1 pb-2">{children}</div>
    </details>
  );
}
