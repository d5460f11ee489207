'use client';

import { changeDecimals, formatDay, formatRange, formatSigned, withUnit } from './numbers';
import { INK } from './palette';
import { IntervalBar, StripAxis, StripDot, StripFrame, StripUpright, StripWord } from './strip-parts';
import { type StripScale, stripScale } from './strip-scale';
import type { CompareStripProps, CompareTest, Interval } from './types';

/** The comparison in words. A refused one gives both values and the reason, and no difference. */
export function compareSentence({ analyte, earlier, later, outcome, locale }: CompareStripProps): string {
  const say = (t: CompareTest): string =>
    `${t.label} (${formatDay(t.takenOn, locale)}) ${withUnit(t.printed, analyte.unit)}`;
  const both = `${say(earlier)}; ${say(later)}.`;
  if (outcome.kind === 'refused') return `${both} No difference is given: ${outcome.reason}`;
  const more = changeDecimals(analyte);
  const { difference, moreThanNoise, widenedBy } = outcome;
  const wider = widenedBy.length === 0 ? '' : ` The interval is wider for ${widenedBy.join(' and ')}.`;
  const noise = moreThanNoise
    ? 'More than the noise of two tests.'
    : 'Not more than the noise of two tests: it may be nothing.';
  return (
    `${both} Difference ${withUnit(formatSigned(difference.estimate, more), analyte.unit)}, ` +
    `90% interval ${formatRange(difference.low, difference.high, more, true)}. ${noise}${wider}`
  );
}

/** Two tests on one scale and, where they may be compared, their difference beside "no change". */
export function CompareStrip(props: CompareStripProps) {
  const { analyte, earlier, later, outcome, zeroWord = 'no change' } = props;
  const least = 4 * 10 ** -analyte.decimals;
  const scale = stripScale(
    [earlier, later].flatMap((t) => [t.value, t.low, t.high]),
    { signed: false, least },
  );
  return (
    <figure className="grid min-w-0 gap-2 break-inside-avoid">
      <StripFrame height={136}>
        <Row scale={scale} test={earlier} y={36} hollow />
        <Row scale={scale} test={later} y={86} />
        <StripAxis scale={scale} y={112} />
      </StripFrame>
      {outcome.kind === 'difference' && (
        <Difference
          difference={outcome.difference}
          decimals={changeDecimals(analyte)}
          least={least}
          zeroWord={zeroWord}
        />
      )}
      <figcaption className="max-w-measure text-sm text-clay">{compareSentence(props)}</figcaption>
    </figure>
  );
}

function Row({
  scale,
  test,
  y,
  hollow = false,
}: {
  scale: StripScale;
  test: CompareTest;
  y: number;
  hollow?: boolean;
}) {
  return (
    <g>
      {test.low !== null && test.high !== null && (
        <IntervalBar scale={scale} y={y} low={test.low} high={test.high} colour={INK.clay} />
      )}
      <StripDot scale={scale} value={test.value} y={y} hollow={hollow} />
      <StripWord scale={scale} value={test.value} y={y - 14} bold={!hollow}>
        {`${test.label}: ${test.printed}`}
      </StripWord>
    </g>
  );
}

function Difference({
  difference,
  decimals,
  least,
  zeroWord,
}: {
  difference: Interval;
  decimals: number;
  least: number;
  zeroWord: string;
}) {
  const scale = stripScale([0, difference.estimate, difference.low, difference.high], { signed: true, least });
  return (
    <StripFrame height={104}>
      <StripUpright scale={scale} value={0} top={6} bottom={64} />
      <IntervalBar scale={scale} y={40} low={difference.low} high={difference.high} />
      <StripDot scale={scale} value={difference.estimate} y={40} />
      <StripWord scale={scale} value={difference.estimate} y={24} bold>
        {`difference ${formatSigned(difference.estimate, decimals)}`}
      </StripWord>
      <StripAxis scale={scale} y={64} zeroWord={zeroWord} />
    </StripFrame>
  );
}
