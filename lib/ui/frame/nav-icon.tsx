'use client';

export type NavIconName =
  | 'today'
  | 'sites'
  | 'ground'
  | 'reports'
  | 'effects'
  | 'reminders'
  | 'people'
  | 'settings'
  | 'more'
  | 'account';

const line = { stroke: 'currentColor', strokeWidth: 1.8, strokeLinecap: 'round', strokeLinejoin: 'round' } as const;

const drawings = {
  today: (
    <>
      <path d="M2 15.5c6 0 7-6.5 13.5-6.5" {...line} />
      <circle cx="16.4" cy="9" r="2.6" fill="currentColor" />
    </>
  ),
  sites: (
    <>
      <path d="M2.5 6.5h15M2.5 11h15M2.5 15.5h15" {...line} />
      <path d="M6 3.5v3M12.5 8v3M8.5 12.5v3" {...line} />
    </>
  ),
  ground: (
    <>
      <path d="M2.5 3h7v9h-7zM12 3h5.5v5H12zM12 10.5h5.5V17H12zM2.5 14.5h7V17h-7z" {...line} />
    </>
  ),
  reports: (
    <>
      <path d="M4 2.5h9l3 3v12H4z" {...line} />
      <path d="M7 8h6M7 11h6M7 14h3.5" {...line} />
    </>
  ),
  effects: (
    <>
      <path d="M2 4.5h16M2 9.5h16" {...line} strokeDasharray="1.5 3" />
      <path d="M2.5 16.5c5 0 6-9.5 11-9.5" {...line} />
      <circle cx="14.4" cy="7" r="2.2" fill="currentColor" />
    </>
  ),
  reminders: (
    <>
      <path d="M10 18V7" {...line} />
      <path d="M6.5 2.5h7V9h-7z" {...line} />
      <path d="M3 18h14" {...line} />
    </>
  ),
  people: (
    <>
      <circle cx="7" cy="6.4" r="2.9" {...line} />
      <path d="M1.8 17c0-3.6 2.2-5.6 5.2-5.6s5.2 2 5.2 5.6" {...line} />
      <path d="M13 4a2.8 2.8 0 0 1 0 5M14.6 11.8c2.2.6 3.6 2.4 3.6 5.2" {...line} />
    </>
  ),
  settings: (
    <>
      <path d="M2.5 5h15M2.5 10h15M2.5 15h15" {...line} />
      <g fill="currentColor">
        <circle cx="12.5" cy="5" r="2.1" />
        <circle cx="6.5" cy="10" r="2.1" />
        <circle cx="14" cy="15" r="2.1" />
      </g>
    </>
  ),
  more: (
    <g fill="currentColor">
      <rect x="3" y="4" width="14" height="2.4" />
      <rect x="3" y="9" width="14" height="2.4" />
      <rect x="3" y="14" width="14" height="2.4" />
    </g>
  ),
  account: (
    <>
      <circle cx="10" cy="6.6" r="3.6" {...line} />
      <path d="M3 18c0-4 3-6.2 7-6.2s7 2.2 7 6.2" {...line} />
    </>
  ),
} satisfies Record<NavIconName, unknown>;

export function NavIcon({ name, className = 'size-5' }: { name: NavIconName; className?: string }) {
  return (
    <svg viewBox="0 0 20 20" className={className} aria-hidden="true" focusable="false" fill="none">
      {drawings[name]}
    </svg>
  );
}
