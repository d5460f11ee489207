'use client';

import { changeDecimals, formatRange, formatSigned, withUnit } from './numbers';
import { INK } from './palette';
import { IntervalBar, StripAxis, StripDot, StripFrame, StripUpright, StripWord, Zone } from './strip-parts';
import { stripScale } from './strip-scale';
import type { IntervalStripProps } from './types';

/** The strip in words; what a screen reader hears and what stands under the drawing. */
export function intervalSentence(props: IntervalStripProps): string {
  const { analyte, planned, plannedWord = 'planned', change, half, oneAndHalf, comparedWith } = props;
  const more = changeDecimals(analyte);
  const [zoneLow, zoneHigh] = zoneOf(planned, half, oneAndHalf);
  const seen = withUnit(formatSigned(change.estimate, more), analyte.unit);
  const than = comparedWith === undefined ? '' : `, ${comparedWith}`;
  return (
    `Change of ${analyte.label} seen${than}: ${seen}, 90% interval ${formatRange(change.low, change.high, more, true)}. ` +
    `${plannedWord === 'due' ? 'Due by then' : 'Planned'}: ${withUnit(formatSigned(planned, more), analyte.unit)}; ` +
    `half to one and a half times that is ${formatRange(zoneLow, zoneHigh, more, true)}.`
  );
}

function zoneOf(planned: number, half: number, oneAndHalf: number | null): readonly [number | null, number | null] {
  return planned >= 0 ? [half, oneAndHalf] : [oneAndHalf, half];
}

/** The change seen against the change planned, on one scale with "no change". */
export function IntervalStrip(props: IntervalStripProps) {
  const { analyte, planned, plannedWord = 'planned', change, half, oneAndHalf, hideSentence = false } = props;
  const [zoneLow, zoneHigh] = zoneOf(planned, half, oneAndHalf);
  const more = changeDecimals(analyte);
  const scale = stripScale([0, planned, half, oneAndHalf, change.estimate, change.low, change.high], {
    signed: true,
    least: 4 * 10 ** -analyte.decimals,
  });
  const inZone = (zoneLow === null || change.estimate >= zoneLow) && (zoneHigh === null || change.estimate <= zoneHigh);
  const top = 24;
  const bottom = 86;
  const middle = 62;
  return (
    <figure className="grid min-w-0 gap-1 break-inside-avoid">
      <StripFrame height={126}>
        <Zone scale={scale} low={zoneLow} high={zoneHigh} top={top} bottom={bottom} />
        <StripUpright scale={scale} value={0} top={top} bottom={bottom} />
        <StripUpright scale={scale} value={planned} top={top - 4} bottom={bottom} dashed colour={INK.gley} />
        <StripWord scale={scale} value={planned} y={14} colour={INK.gley}>
          {`${plannedWord} ${formatSigned(planned, more)}`}
        </StripWord>
        <IntervalBar scale={scale} y={middle} low={change.low} high={change.high} />
        <StripDot scale={scale} value={change.estimate} y={middle} />
        <StripWord
          scale={scale}
          value={change.estimate}
          y={middle - 14}
          bold
          ground={inZone ? INK.gleyWash : INK.chalk}
        >
          {`seen ${formatSigned(change.estimate, more)}`}
        </StripWord>
        <StripAxis scale={scale} y={bottom + 2} zeroWord="no change" />
      </StripFrame>
      <figcaption className={hideSentence ? 'sr-only' : 'max-w-measure text-sm text-clay'}>
        {intervalSentence(props)}
      </figcaption>
    </figure>
  );
}
