import type { PlanOutline, PlanPoint } from './types';

/** Plane geometry of a site plan, in metres, y up. */
export interface Bounds {
  readonly minX: number;
  readonly minY: number;
  readonly maxX: number;
  readonly maxY: number;
}

export interface PlanRectangle {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

export const SNAP_METRES = 0.25;
export const SMALLEST_SIDE_METRES = 0.5;

/** Area of a simple polygon: half the sum of the cross products of its sides (the shoelace formula). */
export function areaOf(outline: PlanOutline): number {
  let twice = 0;
  for (const [index, point] of outline.entries()) {
    const next = outline[(index + 1) % outline.length] ?? point;
    twice += point.x * next.y - next.x * point.y;
  }
  return Math.abs(twice) / 2;
}

export function boundsOf(points: readonly PlanPoint[]): Bounds | null {
  if (points.length === 0) return null;
  const xs = points.map((point) => point.x);
  const ys = points.map((point) => point.y);
  return { minX: Math.min(...xs), minY: Math.min(...ys), maxX: Math.max(...xs), maxY: Math.max(...ys) };
}

export function centreOf(outline: PlanOutline): PlanPoint {
  const bounds = boundsOf(outline);
  return bounds ? { x: (bounds.minX + bounds.maxX) / 2, y: (bounds.minY + bounds.maxY) / 2 } : { x: 0, y: 0 };
}

export function snap(metres: number, step: number = SNAP_METRES): number {
  // The added zero turns -0 into 0.
  return Math.round(metres / step) * step + 0;
}

/** Counter-clockwise from the lower left. */
export function outlineOf(rectangle: PlanRectangle): PlanOutline {
  const { x, y, width, height } = rectangle;
  return [
    { x, y },
    { x: x + width, y },
    { x: x + width, y: y + height },
    { x, y: y + height },
  ];
}

/** The rectangle behind an outline whose four sides run along the axes; null for any other shape. */
export function asRectangle(outline: PlanOutline): PlanRectangle | null {
  const bounds = boundsOf(outline);
  if (!bounds || outline.length !== 4) return null;
  const near = (a: number, b: number) => Math.abs(a - b) < 1e-6;
  const onCorner = outline.every(
    (point) =>
      (near(point.x, bounds.minX) || near(point.x, bounds.maxX)) &&
      (near(point.y, bounds.minY) || near(point.y, bounds.maxY)),
  );
  const width = bounds.maxX - bounds.minX;
  const height = bounds.maxY - bounds.minY;
  if (!onCorner || !near(areaOf(outline), width * height)) return null;
  return { x: bounds.minX, y: bounds.minY, width, height };
}

/** Two opposite corners, in any order, snapped and at least the smallest side long. */
export function rectangleBetween(a: PlanPoint, b: PlanPoint): PlanRectangle {
  const x = snap(Math.min(a.x, b.x));
  const y = snap(Math.min(a.y, b.y));
  return {
    x,
    y,
    width: Math.max(SMALLEST_SIDE_METRES, snap(Math.max(a.x, b.x)) - x),
    height: Math.max(SMALLEST_SIDE_METRES, snap(Math.max(a.y, b.y)) - y),
  };
}

/** Moves an outline; its lower left stays on the plan and on the snap grid. */
export function moveBy(outline: PlanOutline, by: PlanPoint): PlanOutline {
  const bounds = boundsOf(outline);
  if (!bounds) return outline;
  const x = Math.max(0, snap(bounds.minX + by.x)) - bounds.minX;
  const y = Math.max(0, snap(bounds.minY + by.y)) - bounds.minY;
  return outline.map((point) => ({ x: point.x + x, y: point.y + y }));
}

/** Stretches an outline to a new size with its lower left held; free shapes keep their proportions per axis. */
export function resizeTo(outline: PlanOutline, width: number, height: number): PlanOutline {
  const bounds = boundsOf(outline);
  if (!bounds) return outline;
  const wide = bounds.maxX - bounds.minX;
  const high = bounds.maxY - bounds.minY;
  const scaleX = wide > 0 ? Math.max(SMALLEST_SIDE_METRES, snap(width)) / wide : 1;
  const scaleY = high > 0 ? Math.max(SMALLEST_SIDE_METRES, snap(height)) / high : 1;
  return outline.map((point) => ({
    x: bounds.minX + (point.x - bounds.minX) * scaleX,
    y: bounds.minY + (point.y - bounds.minY) * scaleY,
  }));
}

/** Drags one corner: of a rectangle the opposite corner is held, of a free shape only that corner moves. */
export function dragCorner(outline: PlanOutline, index: number, to: PlanPoint): PlanOutline {
  const point = { x: Math.max(0, snap(to.x)), y: Math.max(0, snap(to.y)) };
  const opposite = outline[(index + 2) % outline.length];
  if (asRectangle(outline) && opposite) return outlineOf(rectangleBetween(opposite, point));
  return outline.map((one, at) => (at === index ? point : one));
}

export function isInside(outline: PlanOutline, point: PlanPoint): boolean {
  let inside = false;
  for (const [index, a] of outline.entries()) {
    const b = outline[(index + 1) % outline.length] ?? a;
    const crosses = a.y > point.y !== b.y > point.y;
    if (crosses && point.x < ((b.x - a.x) * (point.y - a.y)) / (b.y - a.y) + a.x) inside = !inside;
  }
  return inside;
}

/** A hint and no refusal: true when sides of the two shapes cross or one lies in the other. Touching is no overlap. */
export function overlaps(a: PlanOutline, b: PlanOutline): boolean {
  const one = boundsOf(a);
  const two = boundsOf(b);
  if (!one || !two) return false;
  if (one.maxX <= two.minX || two.maxX <= one.minX || one.maxY <= two.minY || two.maxY <= one.minY) return false;
  if (sidesOf(a).some((side) => sidesOf(b).some((other) => cross(side, other)))) return true;
  return isInside(b, probe(a)) || isInside(a, probe(b));
}

type Side = readonly [PlanPoint, PlanPoint];

function sidesOf(outline: PlanOutline): Side[] {
  return outline.map((point, index) => [point, outline[(index + 1) % outline.length] ?? point]);
}

function cross([a, b]: Side, [c, d]: Side): boolean {
  const turn = (p: PlanPoint, q: PlanPoint, r: PlanPoint) =>
    Math.sign((q.x - p.x) * (r.y - p.y) - (q.y - p.y) * (r.x - p.x));
  return turn(a, b, c) * turn(a, b, d) < 0 && turn(c, d, a) * turn(c, d, b) < 0;
}

/** A point surely inside a shape: beside the middle of its first side, on the inner hand. */
function probe(outline: PlanOutline): PlanPoint {
  const [a, b] = outline;
  if (!a || !b) return { x: Number.NaN, y: Number.NaN };
  const length = Math.hypot(b.x - a.x, b.y - a.y) || 1;
  const middle = { x: (a.x + b.x) / 2, y: (a.y + b.y) / 2 };
  const step = { x: (-(b.y - a.y) / length) * 1e-4, y: ((b.x - a.x) / length) * 1e-4 };
  const left = { x: middle.x + step.x, y: middle.y + step.y };
  return isInside(outline, left) ? left : { x: middle.x - step.x, y: middle.y - step.y };
}

/** Puts an outline exactly into a rectangle, not snapped: for numbers typed in. */
export function placeAt(outline: PlanOutline, rectangle: PlanRectangle): PlanOutline {
  const bounds = boundsOf(outline);
  if (!bounds) return outline;
  const wide = bounds.maxX - bounds.minX;
  const high = bounds.maxY - bounds.minY;
  return outline.map((point) => ({
    x: rectangle.x + (wide > 0 ? ((point.x - bounds.minX) / wide) * rectangle.width : 0),
    y: rectangle.y + (high > 0 ? ((point.y - bounds.minY) / high) * rectangle.height : 0),
  }));
}

export interface LabelSpot {
  readonly at: PlanPoint;
  /** Size of a box round the spot that lies inside the shape. */
  readonly width: number;
  readonly height: number;
}

const SPOT_STEPS = 24;
/** A label of a few short lines is somewhat wider than it is high. */
const LABEL_ASPECT = 1.6;

/** The place for a label: well inside, so that the label of an L does not lie across its notch. */
export function labelSpot(outline: PlanOutline): LabelSpot {
  const bounds = boundsOf(outline);
  const centre = centreOf(outline);
  if (!bounds) return { at: centre, width: 0, height: 0 };
  const wide = bounds.maxX - bounds.minX;
  const high = bounds.maxY - bounds.minY;
  if (asRectangle(outline)) return { at: centre, width: wide, height: high };
  let best: LabelSpot = { at: centre, width: 0, height: 0 };
  for (let column = 1; column < SPOT_STEPS; column += 1) {
    for (let row = 1; row < SPOT_STEPS; row += 1) {
      const at = { x: bounds.minX + (column / SPOT_STEPS) * wide, y: bounds.minY + (row / SPOT_STEPS) * high };
      if (!isInside(outline, at)) continue;
      const across = nearestCrossings(outline, at, 'x');
      const up = nearestCrossings(outline, at, 'y');
      let width = 2 * Math.min(at.x - across.before, across.after - at.x);
      width = Math.min(width, 2 * LABEL_ASPECT * Math.min(at.y - up.before, up.after - at.y));
      while (width > best.width && !holdsBox(outline, at, width, width / LABEL_ASPECT)) width *= 0.9;
      if (width > best.width) best = { at, width, height: width / LABEL_ASPECT };
    }
  }
  return best;
}

function holdsBox(outline: PlanOutline, at: PlanPoint, width: number, height: number): boolean {
  const within = (point: PlanPoint) => Math.abs(point.x - at.x) < width / 2 && Math.abs(point.y - at.y) < height / 2;
  const corners = outlineOf({ x: at.x - width / 2, y: at.y - height / 2, width, height });
  return !outline.some(within) && !sidesOf(outline).some((side) => sidesOf(corners).some((edge) => cross(side, edge)));
}

function nearestCrossings(outline: PlanOutline, at: PlanPoint, along: 'x' | 'y'): { before: number; after: number } {
  const other = along === 'x' ? 'y' : 'x';
  let before = Number.NEGATIVE_INFINITY;
  let after = Number.POSITIVE_INFINITY;
  for (const [a, b] of sidesOf(outline)) {
    if (a[other] > at[other] === b[other] > at[other]) continue;
    const crossing = a[along] + ((at[other] - a[other]) / (b[other] - a[other])) * (b[along] - a[along]);
    if (crossing <= at[along]) before = Math.max(before, crossing);
    else after = Math.min(after, crossing);
  }
  return { before, after };
}
