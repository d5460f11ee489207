type CoreAndLineProps = { className?: string };

const label = { fontFamily: 'var(--font-text)', fontSize: 17, fill: '#211A16' } as const;
const small = { fontFamily: 'var(--font-text)', fontSize: 14.5, fill: '#5A4E45' } as const;

/** An invented bed: the four tests of the drawing, left to right, in pH. Drawn to one scale: 0.1 pH is 15 units. */
const tests = [
  { x: 176, ph: 5.8, day: 'spring 2023' },
  { x: 290, ph: 5.7, day: 'spring 2024' },
  { x: 424, ph: 6.2, day: 'spring 2025' },
  { x: 552, ph: 6.4, day: 'spring 2026' },
];
const height = (ph: number) => 250 - (ph - 5.7) * 150;

export function CoreAndLine({ className }: CoreAndLineProps) {
  const points = tests.map((test) => `${test.x},${height(test.ph)}`).join(' L');
  return (
    <svg
      viewBox="0 0 640 440"
      className={className}
      role="img"
      aria-label="A drawing: a soil core, and from it a line through four soil tests. After lime was spread in fall 2024 the line rises from pH 5.7 into the target band and ends at 6.4."
    >
      <rect x="128" y={height(6.8)} width="512" height={height(6.2) - height(6.8)} fill="#DDE9EC" />
      <path
        d={`M128 ${height(6.8)}h512M128 ${height(6.2)}h512`}
        stroke="#1D4E63"
        strokeWidth="1.5"
        strokeDasharray="2 5"
      />
      <text x="634" y={height(6.8) + 22} textAnchor="end" {...small} fill="#1D4E63">
        where this crop wants it, 6.2 to 6.8
      </text>

      <path d="M24 30h76v92c-26 6-52-5-76 3z" fill="#2B211B" />
      <path d="M24 133c24-8 50 3 76-3v78c-26 7-52-4-76 3z" fill="#5B4334" />
      <path d="M24 219c24-7 50 4 76-3v66c-28 5-50-6-76 2z" fill="#7E2D10" />
      <path d="M24 292c26-8 48 4 76-2v52c-26 7-54-2-76 4z" fill="#8A6A4A" />
      <path d="M24 354c22-6 52 4 76-4v22c-20 20-44 30-76 34z" fill="#B9A68F" />
      <g fill="#FBF7F0" opacity=".55">
        <circle cx="43" cy="58" r="2" />
        <circle cx="78" cy="84" r="1.5" />
        <circle cx="60" cy="108" r="1.8" />
        <circle cx="84" cy="160" r="2" />
        <circle cx="44" cy="186" r="1.5" />
        <circle cx="68" cy="248" r="1.8" />
        <circle cx="40" cy="318" r="1.6" />
        <circle cx="82" cy="326" r="2" />
      </g>

      <path
        d={`M8 420C70 420 92 300 ${points}`}
        fill="none"
        stroke="#1D4E63"
        strokeWidth="4"
        strokeLinejoin="round"
        strokeLinecap="round"
      />
      {tests.map((test, index) => {
        const y = height(test.ph);
        const last = index === tests.length - 1;
        return (
          <g key={test.day}>
            <path
              d={`M${test.x} ${y - 22}v44M${test.x - 6} ${y - 22}h12M${test.x - 6} ${y + 22}h12`}
              stroke="#1D4E63"
              strokeWidth="1.8"
            />
            <circle cx={test.x} cy={y} r={last ? 10 : 6.5} fill="#1D4E63" stroke="#FBF7F0" strokeWidth="3" />
            <text x={test.x} y={y + 46} textAnchor="middle" {...label} fontWeight="700">
              {test.ph.toFixed(1)}
            </text>
            <text x={test.x} y={y + 65} textAnchor="middle" {...small}>
              {test.day}
            </text>
          </g>
        );
      })}

      <path d={`M356 ${height(6.2) + 6}V372`} stroke="#7E2D10" strokeWidth="2" strokeDasharray="7 4" />
      <path d="M347 388l9-15 9 15z" fill="#7E2D10" />
      <text x="372" y="385" {...label}>
        lime, fall 2024
      </text>
      <text x="372" y="406" {...small}>
        meant +0.5, seen +0.5, as intended
      </text>
    </svg>
  );
}
