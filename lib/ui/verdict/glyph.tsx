'use client';

import type { ReactNode } from 'react';
import type { Verdict } from '../../domain/effects/types';

const HUMUS = '#211A16';
const WASH = '#DDE9EC';
const GLEY = '#1D4E63';

/** The intended zone lies across the middle of each glyph; the line is the soil coming from the left. */
const DRAWINGS: Record<Verdict, ReactNode> = {
  'as intended': (
    <>
      <path d="M4 27C14 27 20 24 34 16" />
      <circle cx="37" cy="15" r="4" fill={HUMUS} stroke="none" />
    </>
  ),
  'short of it': (
    <>
      <path d="M4 28C12 28 20 27.5 31 26.6" />
      <circle cx="36" cy="26.2" r="3.4" fill={WASH} />
    </>
  ),
  'beyond it': (
    <>
      <path d="M4 28C16 27 24 18 35 7.5" />
      <circle cx="38" cy="5.5" r="4" fill={HUMUS} stroke="none" />
    </>
  ),
  'no change seen': (
    <>
      <path d="M4 26h27" strokeDasharray="5 4" />
      <path d="M37 21.5v9M33.5 21.5h7M33.5 30.5h7" />
    </>
  ),
  'went the other way': (
    <>
      <path d="M4 17C16 17 24 20 37 28" />
      <path d="M29.5 28.6l8.6 0.2l-3.4 -7.6" />
    </>
  ),
  'right way, size not settled': (
    <>
      <path d="M4 28C10 28 14 26 18 23" />
      <path d="M18 23L43 4M18 23L44 14M18 23L44 24" />
    </>
  ),
  'cannot tell yet': (
    <>
      <path d="M4 26C8 26 12 25 16 23" />
      <path d="M31 14.5C35 12.5 39 10 44 7" />
    </>
  ),
};

/** Always shown with the word; the same colours for every verdict. */
export function VerdictGlyph({ verdict, small = false }: { verdict: Verdict; small?: boolean }) {
  const scale = small ? 0.75 : 1;
  return (
    <svg
      viewBox="0 0 48 32"
      width={48 * scale}
      height={32 * scale}
      aria-hidden="true"
      className="flex-none"
      fill="none"
      stroke={HUMUS}
      strokeWidth="2.25"
      strokeLinecap="round"
      strokeLinejoin="round"
    >
      <rect y="9" width="48" height="13" fill={WASH} stroke="none" />
      <path d="M1 9h46M1 22h46" stroke={GLEY} strokeWidth="1.5" strokeDasharray="0.5 3.5" />
      {DRAWINGS[verdict]}
    </svg>
  );
}
