import { type Bounds, boundsOf } from './geometry';
import type { LengthUnit, PlanOutline, PlanPoint } from './types';

/** What part of the plan is seen: lower left in metres, and metres across and up. */
export interface PlanView {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

const METRES_PER_FOOT = 0.3048;
const EMPTY_GROUND = { width: 24, height: 16 };

/** The smallest view of the given shape (width over height) that holds the ground, with a margin all round. */
export function fitView(
  outlines: readonly PlanOutline[],
  ground: { readonly width: number; readonly height: number } | undefined,
  aspect: number,
): PlanView {
  const corners: PlanPoint[] = outlines.flat();
  if (ground) corners.push({ x: 0, y: 0 }, { x: ground.width, y: ground.height });
  const bounds: Bounds = boundsOf(corners) ?? {
    minX: 0,
    minY: 0,
    maxX: EMPTY_GROUND.width,
    maxY: EMPTY_GROUND.height,
  };
  const margin = Math.max(1, Math.max(bounds.maxX - bounds.minX, bounds.maxY - bounds.minY) * 0.08);
  const wide = bounds.maxX - bounds.minX + 2 * margin;
  const high = bounds.maxY - bounds.minY + 2 * margin;
  const width = Math.max(wide, high * aspect);
  const height = width / aspect;
  return {
    x: bounds.minX - margin - (width - wide) / 2,
    y: bounds.minY - margin - (height - high) / 2,
    width,
    height,
  };
}

/** Zooms round a point that stays where it is; from about 3 m to 2 km across. */
export function zoomView(view: PlanView, factor: number, round?: PlanPoint): PlanView {
  const width = Math.min(2000, Math.max(3, view.width / factor));
  const share = width / view.width;
  const centre = round ?? { x: view.x + view.width / 2, y: view.y + view.height / 2 };
  return {
    x: centre.x - (centre.x - view.x) * share,
    y: centre.y - (centre.y - view.y) * share,
    width,
    height: view.height * share,
  };
}

/** A round length that takes about a fifth of the view: 1, 2 or 5 times a power of ten of the unit. */
export function scaleBar(view: PlanView, unit: LengthUnit): { readonly metres: number; readonly label: string } {
  const perUnit = unit === 'ft' ? METRES_PER_FOOT : 1;
  const wanted = (view.width * 0.22) / perUnit;
  const power = 10 ** Math.floor(Math.log10(wanted));
  const steps = [5, 2, 1].map((step) => step * power);
  const length = steps.find((step) => step <= wanted) ?? power;
  return { metres: length * perUnit, label: `${Number(length.toPrecision(3))} ${unit}` };
}

/** Distance of the ground's grid lines: a metre or five, or about the same in feet; wider when zoomed out. */
export function gridStep(view: PlanView, unit: LengthUnit): number {
  const perUnit = unit === 'ft' ? METRES_PER_FOOT : 1;
  const steps = unit === 'ft' ? [1, 5, 10, 50, 100, 500] : [0.5, 1, 5, 10, 50, 100];
  const step = steps.find((one) => (one * perUnit) / view.width >= 1 / 45) ?? steps.at(-1) ?? 1;
  return step * perUnit;
}

export function gridLines(
  view: PlanView,
  step: number,
): { readonly xs: readonly number[]; readonly ys: readonly number[] } {
  const between = (from: number, length: number) => {
    const first = Math.ceil(from / step);
    const last = Math.floor((from + length) / step);
    return Array.from({ length: Math.max(0, last - first + 1) }, (_, index) => (first + index) * step);
  };
  return { xs: between(view.x, view.width), ys: between(view.y, view.height) };
}

/** Metres to the drawing's own units, where y points down. */
export function toDrawing(point: PlanPoint, view: PlanView, size: { width: number; height: number }): PlanPoint {
  return {
    x: ((point.x - view.x) / view.width) * size.width,
    y: size.height - ((point.y - view.y) / view.height) * size.height,
  };
}

export function toMetres(point: PlanPoint, view: PlanView, size: { width: number; height: number }): PlanPoint {
  return {
    x: view.x + (point.x / size.width) * view.width,
    y: view.y + ((size.height - point.y) / size.height) * view.height,
  };
}
