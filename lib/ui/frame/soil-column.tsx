'use client';

/** Decor beside the sign-in forms: one core under the line, and four years of readings that leave it. */
export function SoilColumn({ className }: { className?: string }) {
  return (
    <svg
      viewBox="0 0 520 560"
      className={className}
      aria-hidden="true"
      focusable="false"
      preserveAspectRatio="xMidYMin slice"
    >
      <g>
        <path d="M120 0h84v128c-30 6-56-5-84 2z" fill="#2B211B" />
        <path d="M120 138c28-7 54 4 84-2v104c-28 8-58-4-84 3z" fill="#5B4334" />
        <path d="M120 251c26-7 56 5 84-3v92c-30 4-54-8-84 0z" fill="#7E2D10" />
        <path d="M120 348c30-8 54 4 84 0v96c-26 8-60-2-84 4z" fill="#8A6A4A" />
        <path d="M120 456c24-6 58 4 84-4v40c-22 24-50 36-84 40z" fill="#B9A68F" />
      </g>
      <g fill="#FBF7F0" opacity=".5">
        <circle cx="141" cy="36" r="2.2" />
        <circle cx="178" cy="62" r="1.6" />
        <circle cx="160" cy="97" r="2" />
        <circle cx="186" cy="112" r="1.4" />
        <circle cx="137" cy="171" r="1.8" />
        <circle cx="176" cy="204" r="2.2" />
        <circle cx="150" cy="290" r="1.6" />
        <circle cx="188" cy="316" r="2" />
        <circle cx="140" cy="392" r="2" />
        <circle cx="170" cy="420" r="1.6" />
      </g>
      <path d="M204 190h36v-30h316" fill="none" stroke="none" />
      <rect x="236" y="132" width="300" height="70" fill="#DDE9EC" />
      <path d="M236 132h300M236 202h300" stroke="#1D4E63" strokeWidth="1.5" strokeDasharray="2 5" />
      <path
        d="M204 262c30 0 44-6 62-10 18-5 26 22 44 18s30-48 56-62 40 2 62-14 26-22 42-22"
        fill="none"
        stroke="#1D4E63"
        strokeWidth="4"
        strokeLinecap="round"
      />
      <circle cx="470" cy="172" r="9" fill="#1D4E63" stroke="#FBF7F0" strokeWidth="3" />
      <path d="M310 284v34" stroke="#7E2D10" strokeWidth="2" strokeDasharray="7 4" />
      <path d="M302 330l8-13 8 13z" fill="#7E2D10" />
    </svg>
  );
}
