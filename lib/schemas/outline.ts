import './withoutEval';
import { z } from 'zod';

export type PlanPoint = { x: number; y: number };

const LARGEST_M = 5000;

/** Area of a closed polygon in the square of its unit (the surveyor's formula of C. F. Gauss); the order of the corners does not matter. */
export function outlineArea(points: readonly PlanPoint[]): number {
  let twice = 0;
  points.forEach((point, at) => {
    const next = points[(at + 1) % points.length] ?? point;
    twice += point.x * next.y - next.x * point.y;
  });
  return Math.abs(twice) / 2;
}

const turn = (a: PlanPoint, b: PlanPoint, c: PlanPoint) =>
  Math.sign((b.x - a.x) * (c.y - a.y) - (b.y - a.y) * (c.x - a.x));

const within = (a: PlanPoint, b: PlanPoint, c: PlanPoint) =>
  Math.min(a.x, b.x) <= c.x && c.x <= Math.max(a.x, b.x) && Math.min(a.y, b.y) <= c.y && c.y <= Math.max(a.y, b.y);

function touch(a: PlanPoint, b: PlanPoint, c: PlanPoint, d: PlanPoint): boolean {
  const [abc, abd, cda, cdb] = [turn(a, b, c), turn(a, b, d), turn(c, d, a), turn(c, d, b)];
  if (abc !== abd && cda !== cdb) return true;
  return (
    (abc === 0 && within(a, b, c)) ||
    (abd === 0 && within(a, b, d)) ||
    (cda === 0 && within(c, d, a)) ||
    (cdb === 0 && within(c, d, b))
  );
}

/** True when two sides that are no neighbours meet: such an outline has no area to speak of. */
export function crossesItself(points: readonly PlanPoint[]): boolean {
  const sides = points.map((point, at) => [point, points[(at + 1) % points.length] ?? point] as const);
  return sides.some(([a, b], first) =>
    sides.some(([c, d], second) => {
      const apart = second - first;
      if (apart < 2 || (first === 0 && second === sides.length - 1)) return false;
      return touch(a, b, c, d);
    }),
  );
}

const coordinate = z.number().min(-LARGEST_M).max(LARGEST_M);

/** Corners in metres from the plan's lower left, y up. */
export const outlineSchema = z
  .array(z.strictObject({ x: coordinate, y: coordinate }))
  .min(3, 'An outline needs at least three corners.')
  .max(60, 'An outline has at most 60 corners.')
  .refine(
    (points) => !crossesItself(points),
    'The outline crosses itself. Move a corner so that its sides do not meet.',
  )
  .refine((points) => outlineArea(points) >= 0.25, 'This outline encloses next to nothing. Draw it larger.');
