import { cx } from '../cx';

type SkeletonProps = { label: string; shape?: 'lines' | 'table' | 'chart'; rows?: number };

const widths = ['w-11/12', 'w-full', 'w-4/5', 'w-10/12', 'w-3/5'];

/** Layers where the words will stand. The label is what a screen reader hears: "Loading the plots". */
export function Skeleton({ label, shape = 'lines', rows = 4 }: SkeletonProps) {
  const many = Array.from({ length: rows }, (_, index) => index);
  return (
    <div role="status" className="max-w-full">
      <span className="sr-only">{label}</span>
      <div aria-hidden>
        {shape === 'chart' ? <div className="stratum h-56" /> : null}
        {shape === 'lines' ? (
          <div className="grid gap-3">
            {many.map((row) => (
              <div key={row} className={cx('stratum', widths[row % widths.length])} />
            ))}
          </div>
        ) : null}
        {shape === 'table' ? (
          <div className="grid gap-px border-y border-horizon-5">
            {many.map((row) => (
              <div
                key={row}
                className="grid grid-cols-[2fr_1fr_1fr] gap-6 border-b border-horizon-5 py-4 last:border-0"
              >
                <div className={cx('stratum', widths[row % widths.length])} />
                <div className="stratum" />
                <div className="stratum" />
              </div>
            ))}
          </div>
        ) : null}
      </div>
    </div>
  );
}
