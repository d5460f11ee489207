import { type SeriesStyle, seriesStyle } from './palette';
import type { DriftPoint } from './types';

export interface Segment {
  readonly key: string;
  readonly style: SeriesStyle;
  readonly points: readonly DriftPoint[];
  /** Why it is not joined to the segment before; null for the first. */
  readonly breakBefore: string | null;
}

/** Oldest first; two tests of one day keep the order they were given in. */
export function sortPoints(points: readonly DriftPoint[]): DriftPoint[] {
  return [...points].sort((a, b) => a.takenOn.localeCompare(b.takenOn));
}

const kindOf = (point: DriftPoint): string => [point.method, point.laboratory, point.depth].join('\u0000');

/**
 * Cuts the tests where one may not be joined to the one before. A new stretch gets a new marker, unless its method,
 * laboratory and depth were drawn earlier: then it gets that marker again (but never its direct neighbour's).
 */
export function splitSeries(points: readonly DriftPoint[]): Segment[] {
  const stretches: DriftPoint[][] = [];
  for (const point of sortPoints(points)) {
    const last = stretches.at(-1);
    if (last === undefined || point.breakBefore !== null) stretches.push([point]);
    else last.push(point);
  }
  const styleOf = new Map<string, number>();
  let next = 0;
  let previous = -1;
  return stretches.map((stretch, index) => {
    const first = stretch[0];
    const kind = first === undefined ? '' : kindOf(first);
    let style = styleOf.get(kind);
    if (style === undefined || style === previous) {
      style = next;
      next += 1;
      styleOf.set(kind, style);
    }
    previous = style;
    return {
      key: `s${index}`,
      style: seriesStyle(style),
      points: stretch,
      breakBefore: index === 0 ? null : (first?.breakBefore ?? null),
    };
  });
}

/** Pairs of neighbours that a line may join: both read exactly. Below or above a limit, the value is not known. */
export function joinedPairs(segment: Segment): (readonly [DriftPoint, DriftPoint])[] {
  return segment.points.flatMap((point, index) => {
    const next = segment.points[index + 1];
    return next !== undefined && point.qualifier === 'exact' && next.qualifier === 'exact'
      ? [[point, next] as const]
      : [];
  });
}
