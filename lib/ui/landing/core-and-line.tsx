'use client';

const label = { fontFamily: 'var(--font-text)', fontSize: 17, fill: '#211A16' } as const;
const small = { fontFamily: 'var(--font-text)', fontSize: 15, fill: '#5A4E45' } as const;

/** An invented bed. One scale for the line, its whiskers and the band: 0.1 pH is 15 units. */
const readings = [
  { ph: 5.8, season: 'spring', year: '2023' },
  { ph: 5.7, season: 'spring', year: '2024' },
  { ph: 6.2, season: 'spring', year: '2025' },
  { ph: 6.4, season: 'spring', year: '2026' },
];
const SPREAD = 0.13;
const height = (ph: number) => 262 - (ph - 5.7) * 150;

type Layout = {
  width: number;
  x: readonly [number, number, number, number];
  band: number;
  lime: number;
  short: boolean;
};
const wide: Layout = { width: 640, x: [176, 290, 424, 556], band: 128, lime: 356, short: false };
const narrow: Layout = { width: 400, x: [132, 204, 284, 362], band: 92, lime: 243, short: true };

const said =
  'A drawing: a soil core, and from its foot a line through four yearly tests. After lime was spread in fall 2024 the line rises from pH 5.7 into the target band and ends at 6.4.';

/** A core hanging from the ground line, and the line that leaves its foot and ends at today's dot. */
export function CoreAndLine() {
  return (
    <div className="-mt-1.5">
      <Drawing layout={wide} className="hidden w-full max-w-160 sm:block lg:hidden xl:block" />
      <Drawing layout={narrow} className="w-full max-w-110 sm:hidden lg:block xl:hidden" />
    </div>
  );
}

function Drawing({ layout, className }: { layout: Layout; className: string }) {
  const { width, x, band, lime, short } = layout;
  const points = readings.map((reading, index) => ({ ...reading, x: x[index] ?? 0, y: height(reading.ph) }));
  const top = height(6.8);
  const bottom = height(6.2);
  return (
    <svg viewBox={`0 0 ${width} 440`} className={className} role="img" aria-label={said}>
      <rect x={band} y={top} width={width - band} height={bottom - top} fill="#DDE9EC" />
      <path
        d={`M${band} ${top}H${width}M${band} ${bottom}H${width}`}
        stroke="#1D4E63"
        strokeWidth="1.5"
        strokeDasharray="2 5"
      />
      <text x={width - 8} y={top + 24} textAnchor="end" {...small} fill="#1D4E63">
        {short ? 'wanted: 6.2 to 6.8' : 'where this crop wants it, 6.2 to 6.8'}
      </text>
      <Core slim={short} />
      <path
        d={`M8 424C70 424 92 300 ${points.map((point) => `${point.x},${point.y}`).join(' L')}`}
        fill="none"
        stroke="#1D4E63"
        strokeWidth="4"
        strokeLinejoin="round"
        strokeLinecap="round"
      />
      <path d={`M${lime} ${bottom + 6}V376`} stroke="#7E2D10" strokeWidth="2" strokeDasharray="7 4" />
      <path d={`M${lime - 9} 392l9-15 9 15z`} fill="#7E2D10" />
      <text x={short ? lime - 6 : lime + 18} y={short ? 413 : 389} textAnchor={short ? 'middle' : 'start'} {...label}>
        lime, fall 2024
      </text>
      <text x={short ? lime - 6 : lime + 18} y={short ? 433 : 411} textAnchor={short ? 'middle' : 'start'} {...small}>
        meant +0.5, seen +0.5: as intended
      </text>
      {points.map((point, index) => (
        <Reading
          key={point.year}
          {...point}
          last={index === points.length - 1}
          when={short ? point.year : `${point.season} ${point.year}`}
        />
      ))}
    </svg>
  );
}

type ReadingProps = { x: number; y: number; ph: number; when: string; last: boolean };

function Reading({ x, y, ph, when, last }: ReadingProps) {
  const reach = SPREAD * 150;
  // The last reading stands inside the band; its number goes below the band's edge.
  const under = y + reach + (last ? 33 : 22);
  return (
    <g>
      <path
        d={`M${x} ${y - reach}v${2 * reach}M${x - 6} ${y - reach}h12M${x - 6} ${y + reach}h12`}
        stroke="#1D4E63"
        strokeWidth="1.8"
      />
      <circle cx={x} cy={y} r={last ? 10 : 6.5} fill="#1D4E63" stroke="#FBF7F0" strokeWidth="3" />
      <text x={x} y={under} textAnchor="middle" {...label} fontWeight="700">
        {ph.toFixed(1)}
      </text>
      <text x={x} y={under + 19} textAnchor="middle" {...small}>
        {when}
      </text>
    </g>
  );
}

function Core({ slim }: { slim: boolean }) {
  return (
    <g transform={slim ? 'translate(4 0) scale(.72 1)' : undefined}>
      <path d="M24 0h76v118c-26 6-52-5-76 3z" fill="#2B211B" />
      <path d="M24 129c24-8 50 3 76-3v84c-26 7-52-4-76 3z" fill="#5B4334" />
      <path d="M24 221c24-7 50 4 76-3v72c-28 5-50-6-76 2z" fill="#7E2D10" />
      <path d="M24 300c26-8 48 4 76-2v54c-26 7-54-2-76 4z" fill="#8A6A4A" />
      <path d="M24 364c22-6 52 4 76-4v22c-20 20-44 30-76 34z" fill="#B9A68F" />
      <g fill="#FBF7F0" opacity=".55">
        <circle cx="43" cy="38" r="2" />
        <circle cx="78" cy="70" r="1.5" />
        <circle cx="60" cy="100" r="1.8" />
        <circle cx="84" cy="156" r="2" />
        <circle cx="44" cy="186" r="1.5" />
        <circle cx="68" cy="250" r="1.8" />
        <circle cx="40" cy="326" r="1.6" />
        <circle cx="82" cy="332" r="2" />
      </g>
    </g>
  );
}
