'use client';

import type { DriftLayout } from './drift-layout';
import { formatDay } from './numbers';
import { INK } from './palette';
import { splitSeries } from './series';
import { Mark } from './shapes';
import type { DriftAmendment, DriftPoint } from './types';

interface DriftKeyProps {
  readonly points: readonly DriftPoint[];
  readonly amendments: readonly DriftAmendment[];
  /** Numbered flags stand on the axis, so the list below says what they are. */
  readonly flags: DriftLayout['flags'];
  readonly locale?: string;
}

/** What the marks mean, in words under the chart. */
export function DriftKey({ points, amendments, flags, locale }: DriftKeyProps) {
  const segments = splitSeries(points);
  const kinds = segments.filter((s, i) => segments.findIndex((t) => t.style.name === s.style.name) === i);
  const hasRange = points.some((p) => p.qualifier === 'exact' && p.low !== null && p.high !== null);
  const hasLimit = points.some((p) => p.qualifier !== 'exact');
  const sorted = [...amendments].sort((a, b) => a.on.localeCompare(b.on));
  return (
    <div className="grid gap-2 text-sm text-clay">
      <ul className="flex flex-wrap gap-x-5 gap-y-1">
        {kinds.map(({ key, style, points: own }) => (
          <li key={key} className="flex items-center gap-2">
            <svg width="30" height="14" aria-hidden="true" className="flex-none">
              <line x1="1" x2="29" y1="7" y2="7" stroke={style.colour} strokeWidth="2" strokeDasharray={style.dash} />
              <Mark x={15} y={7} colour={style.colour} shape={style.marker} size={4} />
            </svg>
            {[own[0]?.method, own[0]?.laboratory].filter(Boolean).join(', ') || 'method not stated'}
          </li>
        ))}
        {hasRange && (
          <li className="flex items-center gap-2">
            <svg width="12" height="16" aria-hidden="true" className="flex-none">
              <path d="M6 1v14M2 1h8M2 15h8" stroke={INK.humus} strokeWidth="1.5" fill="none" />
            </svg>
            95% range of one test
          </li>
        )}
        {hasLimit && (
          <li className="flex items-center gap-2">
            <svg width="14" height="14" aria-hidden="true" className="flex-none">
              <path d="M1 2h12l-6 10z" fill={INK.chalk} stroke={INK.humus} strokeWidth="1.5" />
            </svg>
            beyond what the laboratory can read
          </li>
        )}
        {sorted.length > 0 && (
          <li className="flex items-center gap-2">
            <svg width="14" height="14" aria-hidden="true" className="flex-none">
              <path d="M7 2l6 10h-12z" fill={INK.redHorizon} />
            </svg>
            amendment spread
          </li>
        )}
      </ul>
      {segments.slice(1).map(({ key, breakBefore, points: own }) => (
        <p key={key}>
          <span aria-hidden="true" className="font-bold text-humus">
            {'// '}
          </span>
          Line broken before {formatDay(own[0]?.takenOn ?? '', locale)}: {breakBefore}, not joined.
        </p>
      ))}
      {flags && (
        <ol className="grid gap-x-6 gap-y-1 sm:grid-cols-2">
          {sorted.map((a, index) => (
            <li key={a.id} className="flex gap-2">
              <span className="inline-grid h-5 min-w-5 flex-none place-items-center border border-core-red px-1 text-xs font-bold text-core-red">
                {index + 1}
              </span>
              <span>
                {formatDay(a.on, locale)}: {a.label}
                {a.detail === undefined ? '' : `, ${a.detail}`}
              </span>
            </li>
          ))}
        </ol>
      )}
    </div>
  );
}
