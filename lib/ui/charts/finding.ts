import { formatDay, formatNumber, withUnit } from './numbers';
import { splitSeries } from './series';
import type { ChartAnalyte, DriftPoint, TargetBand } from './types';

/** Fewer than four tests support no statement of a trend. */
const LEAST_FOR_TREND = 4;
const COUNT_WORDS = ['No', 'One', 'Two', 'Three'];

interface FindingInput {
  readonly analyte: ChartAnalyte;
  readonly points: readonly DriftPoint[];
  readonly band: TargetBand | null;
  readonly locale?: string;
}

function bandWords(point: DriftPoint, band: TargetBand | null): string {
  if (band === null || (band.low === null && band.high === null) || point.qualifier === 'below-unknown') return '';
  if (point.qualifier === 'below' && (band.low === null || point.value > band.low)) return '';
  if (point.qualifier === 'above' && (band.high === null || point.value < band.high)) return '';
  if (band.low !== null && point.value < band.low) return ', below the target band';
  if (band.low !== null && point.qualifier === 'below') return ', below the target band';
  if (band.high !== null && point.value > band.high) return ', above the target band';
  if (band.high !== null && point.qualifier === 'above') return ', above the target band';
  return ', inside the target band';
}

/**
 * One sentence or two above a chart, written from the points alone. It states values, days and the band, and says how many
 * tests there are; it never claims a trend. Tests across a break are not set against each other.
 */
export function driftFinding({ analyte, points, band, locale }: FindingInput): string {
  const segments = splitSeries(points);
  const current = segments.at(-1);
  const last = current?.points.at(-1);
  const first = current?.points[0];
  if (current === undefined || last === undefined || first === undefined) {
    return `No confirmed ${analyte.label} test yet. The first one puts a dot here.`;
  }
  const say = (p: DriftPoint): string => `${withUnit(p.printed, analyte.unit)} on ${formatDay(p.takenOn, locale)}`;
  const count = current.points.length;
  const broken = segments.length > 1;
  const since = broken ? ` since the last break (${current.breakBefore ?? 'not joined'})` : '';
  const where = bandWords(last, band);
  if (count === 1) {
    const more = broken
      ? 'Earlier tests are not joined to it.'
      : 'A second one, taken the same way, gives a difference.';
    return `One test${since}: ${analyte.label} ${say(last)}${where}. ${more}`;
  }
  const exact = first.qualifier === 'exact' && last.qualifier === 'exact';
  const from = exact
    ? `${formatNumber(first.value, analyte.decimals)} on ${formatDay(first.takenOn, locale)}`
    : say(first);
  const move = `${analyte.label} went from ${from} to ${say(last)}${where}.`;
  if (count < LEAST_FOR_TREND) {
    return `${COUNT_WORDS[count] ?? count} tests${since}: ${move} Fewer than four tests show no trend.`;
  }
  return `${count} tests${since}: ${move}`;
}
