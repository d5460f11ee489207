'use client';

import { changeDecimals, formatDay, formatRange, withUnit } from './numbers';
import { INK } from './palette';
import { IntervalBar, StripAxis, StripDot, StripFrame, StripLink, StripWord, Zone } from './strip-parts';
import { stripScale } from './strip-scale';
import type { DumbbellEnd, DumbbellProps } from './types';

export function dumbbellSentence(props: DumbbellProps): string {
  const { analyte, before, after, intended, target, intervalWords = '95% range', locale } = props;
  const more = changeDecimals(analyte);
  const end = (word: string, e: DumbbellEnd): string => {
    const range = e.low === null || e.high === null ? '' : ` (${intervalWords} ${formatRange(e.low, e.high, more)})`;
    return `${word} ${withUnit(e.printed, analyte.unit)} on ${formatDay(e.takenOn, locale)}${range}`;
  };
  const band = target == null ? '' : ` Target band: ${target.label}.`;
  return (
    `${analyte.label} ${end('before', before)}; ${end('after', after)}. ` +
    `Meant to land at ${withUnit(formatRange(intended.low, intended.high, more), analyte.unit)}.${band}`
  );
}

/** Before (hollow) and after (filled) on one scale, with the place where the after-test was meant to land. */
export function Dumbbell(props: DumbbellProps) {
  const { analyte, before, after, intended, changeIsClear, locale } = props;
  const values = [
    before.value,
    before.low,
    before.high,
    after.value,
    after.low,
    after.high,
    intended.low,
    intended.high,
  ];
  const scale = stripScale(values, { signed: false, least: 4 * 10 ** -analyte.decimals });
  const landed =
    (intended.low === null || after.value >= intended.low) && (intended.high === null || after.value <= intended.high);
  const rows = { before: 34, after: 84 };
  const bottom = 112;
  const words = (word: string, e: DumbbellEnd): string => `${word} ${e.printed}, ${formatDay(e.takenOn, locale)}`;
  return (
    <figure className="grid min-w-0 gap-1 break-inside-avoid">
      <StripFrame height={136}>
        <Zone scale={scale} low={intended.low} high={intended.high} top={4} bottom={bottom - 2} />
        <StripLink
          scale={scale}
          from={before.value}
          to={after.value}
          y1={rows.before}
          y2={rows.after}
          arrow={changeIsClear}
        />
        <End scale={scale} end={before} y={rows.before} hollow />
        <StripWord scale={scale} value={before.value} y={rows.before - 14}>
          {words('before', before)}
        </StripWord>
        <End scale={scale} end={after} y={rows.after} />
        <StripWord
          scale={scale}
          value={after.value}
          y={rows.after + 22}
          bold
          ground={landed ? INK.gleyWash : INK.chalk}
        >
          {words('after', after)}
        </StripWord>
        <StripAxis scale={scale} y={bottom} />
      </StripFrame>
      <figcaption className="max-w-measure text-sm text-clay">{dumbbellSentence(props)}</figcaption>
    </figure>
  );
}

function End({
  scale,
  end,
  y,
  hollow = false,
}: {
  scale: ReturnType<typeof stripScale>;
  end: DumbbellEnd;
  y: number;
  hollow?: boolean;
}) {
  return (
    <g>
      {end.low !== null && end.high !== null && (
        <IntervalBar scale={scale} y={y} low={end.low} high={end.high} colour={INK.clay} />
      )}
      <StripDot scale={scale} value={end.value} y={y} hollow={hollow} />
    </g>
  );
}
