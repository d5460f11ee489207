'use client';

import { cx } from '../cx';

type LogoProps = {
  /** `light` stands on chalk or white, `dark` on peat, `mono` is one ink for print and small uses. */
  on?: 'light' | 'dark' | 'mono';
  className?: string;
  /** Left out when the word stands beside it. */
  label?: string;
};

const inks = {
  light: { core: ['#211A16', '#7E2D10', '#A48E77'], line: '#1D4E63' },
  dark: { core: ['#FBF7F0', '#D9CDBB', '#A48E77'], line: '#F7E6C8' },
  mono: { core: ['#211A16', '#211A16', '#211A16'], line: '#211A16' },
};

/** A soil core that is the upright of an L; its foot is the measured line, rising to today's dot. */
export function LogoMark({ on = 'light', className, label }: LogoProps) {
  const { core, line } = inks[on];
  return (
    <svg
      viewBox="0 0 32 32"
      className={className ?? 'size-9'}
      role={label ? 'img' : undefined}
      aria-label={label}
      aria-hidden={label ? undefined : 'true'}
    >
      <path d="M6 2h7v8H6z" fill={core[0]} />
      <path d="M6 11.2h7v6H6z" fill={core[1]} />
      <path d="M6 18.4h7V23c-2.6 1.6-4.6 2.2-7 2.4z" fill={core[2]} />
      <path
        d="M4 29c7 0 10.2-2.2 13.6-5.4C20.4 21 22.6 19.4 27 19.4"
        fill="none"
        stroke={line}
        strokeWidth="3.4"
        strokeLinecap="round"
      />
      <circle cx="27" cy="19.4" r="3" fill={line} />
    </svg>
  );
}

export function Wordmark({ on = 'light', className }: Pick<LogoProps, 'on' | 'className'>) {
  return (
    <span className={cx('inline-flex items-center gap-2', className)}>
      <LogoMark on={on} />
      <span className="font-display text-xl leading-none font-semibold tracking-tight">Loamline</span>
    </span>
  );
}
