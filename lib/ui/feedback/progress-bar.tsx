'use client';

type ProgressBarProps = {
  label: string;
  /** 0 to 100; undefined while the length is not known. */
  percent?: number | undefined;
  /** What the number means: "page 2 of 6", "1.2 of 3.4 MB". */
  valueText: string;
};

/** The datum line, drawn as far as the work has come. Sizes are SVG attributes: no style attribute in the page. */
export function ProgressBar({ label, percent, valueText }: ProgressBarProps) {
  const known = percent === undefined ? undefined : Math.min(100, Math.max(0, Math.round(percent)));
  return (
    <div className="grid gap-1">
      <p className="flex flex-wrap justify-between gap-x-4 text-sm">
        <span className="min-w-0 font-semibold break-words">{label}</span>
        <span className="text-clay">{valueText}</span>
      </p>
      <div
        role="progressbar"
        aria-label={label}
        aria-valuemin={0}
        aria-valuemax={100}
        aria-valuenow={known}
        aria-valuetext={valueText}
        className="px-[7px]"
      >
        <svg
          className={known === undefined ? 'busy-mark h-4 w-full overflow-visible' : 'h-4 w-full overflow-visible'}
          aria-hidden="true"
        >
          <line
            x1="0"
            x2="100%"
            y1="8"
            y2="8"
            stroke="#85776A"
            strokeWidth="2"
            strokeDasharray="1 5"
            strokeLinecap="round"
          />
          {known === undefined ? (
            ['0%', '36%', '72%'].map((x) => <rect key={x} x={x} y="6" width="28%" height="4" rx="2" fill="#1D4E63" />)
          ) : (
            <>
              <rect x="0" y="6" width={`${known}%`} height="4" rx="2" fill="#1D4E63" />
              <circle cx={`${known}%`} cy="8" r="7" fill="#1D4E63" />
            </>
          )}
        </svg>
      </div>
    </div>
  );
}
