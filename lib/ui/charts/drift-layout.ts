import { dayMs, formatNumber, withUnit } from './numbers';
import { share, timeSpan, timeTickLabel, timeTicks, valueAxis } from './scale';
import { joinedPairs, type Segment, splitSeries } from './series';
import type { ChartAnalyte, DriftAmendment, DriftPoint, TargetBand } from './types';

/** Above this many amendments, or where their words would run into each other, numbered flags stand on the axis. */
export const MOST_LABELS = 4;
const CHAR_WIDTH = 7;
const MARGIN = { top: 26, right: 58, left: 46 } as const;
const DOT_GAP = 20;
/** How far above the axis a result without any known value stands. */
const FOOT = 8;

export interface LayoutInput {
  readonly analyte: ChartAnalyte;
  readonly points: readonly DriftPoint[];
  readonly amendments: readonly DriftAmendment[];
  readonly band: TargetBand | null;
  readonly asOf: string;
  readonly locale?: string;
  readonly width: number;
  readonly height: number;
}

export interface PlacedPoint {
  readonly point: DriftPoint;
  readonly segment: Segment;
  readonly x: number;
  readonly y: number;
  readonly whisker: { readonly top: number; readonly bottom: number } | null;
}

export interface PlacedAmendment {
  readonly amendment: DriftAmendment;
  readonly x: number;
  /** The words, or the number of its flag. */
  readonly text: string;
  readonly textX: number;
  readonly anchor: 'start' | 'middle' | 'end';
  readonly row: number;
}

export interface DriftLayout {
  readonly plot: { readonly left: number; readonly right: number; readonly top: number; readonly bottom: number };
  readonly timeDomain: readonly [number, number];
  readonly valueDomain: readonly [number, number];
  readonly xTicks: readonly { readonly x: number; readonly label: string }[];
  readonly xTickY: number;
  readonly yTicks: readonly { readonly y: number; readonly label: string }[];
  readonly band: {
    readonly top: number;
    readonly bottom: number;
    readonly hasTop: boolean;
    readonly hasBottom: boolean;
  } | null;
  readonly lines: readonly {
    readonly segment: Segment;
    readonly x1: number;
    readonly y1: number;
    readonly x2: number;
    readonly y2: number;
  }[];
  readonly points: readonly PlacedPoint[];
  readonly amendments: readonly PlacedAmendment[];
  readonly flags: boolean;
  readonly breaks: readonly { readonly x: number; readonly reason: string }[];
  readonly datum: string;
  readonly last: { readonly x: number; readonly y: number; readonly label: string; readonly known: boolean } | null;
}

type Anchor = PlacedAmendment['anchor'];

function placeWords(
  x: number,
  text: string,
  left: number,
  right: number,
): { textX: number; anchor: Anchor; from: number; to: number } {
  const width = text.length * CHAR_WIDTH;
  if (x - width / 2 < left) return { textX: left, anchor: 'start', from: left, to: left + width };
  if (x + width / 2 > right) return { textX: right, anchor: 'end', from: right - width, to: right };
  return { textX: x, anchor: 'middle', from: x - width / 2, to: x + width / 2 };
}

function placeAmendments(
  amendments: readonly DriftAmendment[],
  xOf: (ms: number) => number,
  edge: { left: number; right: number },
): { placed: PlacedAmendment[]; flags: boolean } {
  const sorted = [...amendments].sort((a, b) => a.on.localeCompare(b.on));
  const words = sorted.map((amendment) => {
    const x = xOf(dayMs(amendment.on));
    return { amendment, x, ...placeWords(x, amendment.label, edge.left, edge.right) };
  });
  const collide = words.some((w, i) => {
    const next = words[i + 1];
    return next !== undefined && w.to + 8 > next.from;
  });
  const tooWide = words.some((w) => w.to - w.from > edge.right - edge.left);
  if (sorted.length <= MOST_LABELS && !collide && !tooWide) {
    const placed = words.map(({ amendment, x, textX, anchor }) => ({
      amendment,
      x,
      text: amendment.label,
      textX,
      anchor,
      row: 0,
    }));
    return { placed, flags: false };
  }
  const lastInRow: number[] = [];
  const placed = words.map(({ amendment, x }, index): PlacedAmendment => {
    const free = lastInRow.findIndex((at) => x - at >= 20);
    const row = free >= 0 ? free : lastInRow.length;
    lastInRow[row] = x;
    return { amendment, x, text: String(index + 1), textX: x, anchor: 'middle', row };
  });
  return { placed, flags: true };
}

/** The axis is the datum line: level, a dip at each amendment, then up to the last value. */
function datumPath(
  left: number,
  right: number,
  bottom: number,
  dips: readonly number[],
  last: { x: number; y: number } | null,
): string {
  const parts = [`M${left} ${bottom}`];
  const sorted = [...dips].sort((a, b) => a - b);
  for (const [index, x] of sorted.entries()) {
    const before = x - (sorted[index - 1] ?? Number.NEGATIVE_INFINITY);
    const after = (sorted[index + 1] ?? Number.POSITIVE_INFINITY) - x;
    const near = Math.min(6, before / 2);
    const far = Math.min(6, after / 2);
    parts.push(
      `L${x - near} ${bottom} Q${x - near / 3} ${bottom} ${x} ${bottom + 5} Q${x + far / 3} ${bottom} ${x + far} ${bottom}`,
    );
  }
  parts.push(`L${right} ${bottom}`);
  if (last !== null) parts.push(`C${last.x} ${bottom} ${right} ${last.y} ${last.x} ${last.y}`);
  return parts.join(' ');
}

/**
 * Where everything of a drift chart lies, in pixels. Pure, so that the interactive chart and the exported picture are the
 * same drawing, and so that it can be checked without a browser.
 */
export function driftLayout(input: LayoutInput): DriftLayout {
  const { analyte, points, amendments, band, asOf, locale, width, height } = input;
  const { fromMs, toMs } = timeSpan(points, amendments, asOf);
  const left = MARGIN.left;
  const right = Math.max(left + 40, width - MARGIN.right);
  const xOf = (ms: number): number => left + share(ms, fromMs, toMs) * (right - left);
  const { placed, flags } = placeAmendments(amendments, xOf, { left: 4, right: width - 4 });
  const rows = placed.length === 0 ? 0 : Math.max(...placed.map((p) => p.row)) + 1;
  const below = (rows === 0 ? 0 : 18 + rows * 18) + 26;
  const top = MARGIN.top;
  const bottom = Math.max(top + 60, height - below);
  const axis = valueAxis(points, band, analyte, height < 240 ? 3 : 5);
  const yOf = (value: number): number => bottom - share(value, axis.min, axis.max) * (bottom - top);
  const segments = splitSeries(points);
  const placedPoints = segments.flatMap((segment) =>
    segment.points.map((point): PlacedPoint => {
      const { low, high } = point;
      const whisker =
        point.qualifier === 'exact' && low !== null && high !== null ? { top: yOf(high), bottom: yOf(low) } : null;
      const y = point.qualifier === 'below-unknown' ? bottom - FOOT : yOf(point.value);
      return { point, segment, x: xOf(dayMs(point.takenOn)), y, whisker };
    }),
  );
  const lastPoint = placedPoints.at(-1);
  const last =
    lastPoint === undefined
      ? null
      : {
          x: right + DOT_GAP,
          y: lastPoint.y,
          label: lastPoint.point.printed,
          known: lastPoint.point.qualifier === 'exact',
        };
  const { ticks, months } = timeTicks(fromMs, toMs, Math.max(2, Math.floor((right - left) / 78)));
  return {
    plot: { left, right, top, bottom },
    timeDomain: [fromMs, toMs],
    valueDomain: [axis.min, axis.max],
    xTicks: ticks.map((ms) => ({ x: xOf(ms), label: timeTickLabel(ms, months, locale) })),
    xTickY: height - 8,
    yTicks: axis.ticks.map((value) => ({ y: yOf(value), label: tickLabel(value, axis.ticks) })),
    band: placeBand(band, axis.min, axis.max, yOf),
    lines: segments.flatMap((segment) =>
      joinedPairs(segment).map(([a, b]) => ({
        segment,
        x1: xOf(dayMs(a.takenOn)),
        y1: yOf(a.value),
        x2: xOf(dayMs(b.takenOn)),
        y2: yOf(b.value),
      })),
    ),
    points: placedPoints,
    amendments: placed,
    flags,
    breaks: placeBreaks(segments, xOf),
    datum: datumPath(
      left,
      right,
      bottom,
      placed.map((p) => p.x),
      last,
    ),
    last,
  };
}

function tickLabel(value: number, ticks: readonly number[]): string {
  const decimals = Math.max(0, ...ticks.map((t) => (String(t).split('.')[1] ?? '').length));
  return formatNumber(value, decimals);
}

function placeBand(
  band: TargetBand | null,
  min: number,
  max: number,
  yOf: (value: number) => number,
): DriftLayout['band'] {
  if (band === null || (band.low === null && band.high === null)) return null;
  return {
    top: yOf(band.high ?? max),
    bottom: yOf(band.low ?? min),
    hasTop: band.high !== null,
    hasBottom: band.low !== null,
  };
}

function placeBreaks(segments: readonly Segment[], xOf: (ms: number) => number): DriftLayout['breaks'] {
  return segments.flatMap((segment, index) => {
    const before = segments[index - 1]?.points.at(-1);
    const after = segment.points[0];
    if (before === undefined || after === undefined || segment.breakBefore === null) return [];
    return [{ x: (xOf(dayMs(before.takenOn)) + xOf(dayMs(after.takenOn))) / 2, reason: segment.breakBefore }];
  });
}

/** The words at the top of the value axis. */
export function axisTitle(analyte: ChartAnalyte): string {
  return withUnit(analyte.label, analyte.unit === '' ? '' : `(${analyte.unit})`);
}
