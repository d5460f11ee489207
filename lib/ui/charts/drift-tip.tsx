import { changeDecimals, formatDay, formatRange, withUnit } from './numbers';
import type { ChartAnalyte, DriftPoint } from './types';

interface DriftTipProps {
  readonly point: DriftPoint;
  readonly analyte: ChartAnalyte;
  readonly locale?: string;
}

/** One test in words, beside its dot. Escape sends it away. */
export function DriftTip({ point, analyte, locale }: DriftTipProps) {
  const where = [point.method, point.laboratory, point.depth].filter(Boolean).join(', ');
  return (
    <div className="max-w-60 border border-fallow bg-white px-3 py-2 text-sm leading-snug text-humus shadow-[0_2px_0_var(--color-gley)]">
      <p className="font-bold">{formatDay(point.takenOn, locale)}</p>
      <p>
        {analyte.label} <span className="font-figures">{withUnit(point.printed, analyte.unit)}</span>
      </p>
      {point.qualifier === 'exact' && point.low !== null && point.high !== null && (
        <p className="text-clay">95% range {formatRange(point.low, point.high, changeDecimals(analyte))}</p>
      )}
      {point.qualifier === 'below' && <p className="text-clay">below what the laboratory can read</p>}
      {point.qualifier === 'below-unknown' && <p className="text-clay">below a limit the laboratory does not state</p>}
      {point.qualifier === 'above' && <p className="text-clay">above what the laboratory can read</p>}
      {where !== '' && <p className="text-clay">{where}</p>}
      {point.breakBefore !== null && <p className="text-clay">Not joined to the test before: {point.breakBefore}.</p>}
      {point.href !== undefined && (
        <p>
          <a href={point.href} className="text-link">
            Open its report
          </a>
        </p>
      )}
    </div>
  );
}
