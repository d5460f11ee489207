import type { Point, Quad } from './types';

/** A projective map of the plane, row by row. */
export type Matrix = readonly [number, number, number, number, number, number, number, number, number];

export const SAME: Matrix = [1, 0, 0, 0, 1, 0, 0, 0, 1];

export function scaling(x: number, y: number): Matrix {
  return [x, 0, 0, 0, y, 0, 0, 0, 1];
}

export function shifting(x: number, y: number): Matrix {
  return [1, 0, x, 0, 1, y, 0, 0, 1];
}

/** Turns by an angle in radians, from the x axis towards the y axis. */
export function turning(angle: number): Matrix {
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  return [c, -s, 0, s, c, 0, 0, 0, 1];
}

function twice(a: Matrix, b: Matrix): Matrix {
  const [a0, a1, a2, a3, a4, a5, a6, a7, a8] = a;
  const [b0, b1, b2, b3, b4, b5, b6, b7, b8] = b;
  return [
    a0 * b0 + a1 * b3 + a2 * b6,
    a0 * b1 + a1 * b4 + a2 * b7,
    a0 * b2 + a1 * b5 + a2 * b8,
    a3 * b0 + a4 * b3 + a5 * b6,
    a3 * b1 + a4 * b4 + a5 * b7,
    a3 * b2 + a4 * b5 + a5 * b8,
    a6 * b0 + a7 * b3 + a8 * b6,
    a6 * b1 + a7 * b4 + a8 * b7,
    a6 * b2 + a7 * b5 + a8 * b8,
  ];
}

/** The maps one after another, the last one first. */
export function chain(...maps: readonly Matrix[]): Matrix {
  return maps.reduce(twice, SAME);
}

export function inverse(m: Matrix): Matrix {
  const [a, b, c, d, e, f, g, h, i] = m;
  const [p, q, r] = [e * i - f * h, c * h - b * i, b * f - c * e];
  const det = a * p + d * q + g * r || 1e-12;
  return [
    p / det,
    q / det,
    r / det,
    (f * g - d * i) / det,
    (a * i - c * g) / det,
    (c * d - a * f) / det,
    (d * h - e * g) / det,
    (b * g - a * h) / det,
    (a * e - b * d) / det,
  ];
}

export function carry(m: Matrix, x: number, y: number): Point {
  const w = m[6] * x + m[7] * y + m[8] || 1e-12;
  return { x: (m[0] * x + m[1] * y + m[2]) / w, y: (m[3] * x + m[4] * y + m[5]) / w };
}

/** The map that takes the unit square onto a quadrilateral (Heckbert's closed form). */
function unitToQuad([p0, p1, p2, p3]: Quad): Matrix {
  const [dx1, dx2, dx3] = [p1.x - p2.x, p3.x - p2.x, p0.x - p1.x + p2.x - p3.x];
  const [dy1, dy2, dy3] = [p1.y - p2.y, p3.y - p2.y, p0.y - p1.y + p2.y - p3.y];
  const det = dx1 * dy2 - dx2 * dy1 || 1e-12;
  const g = (dx3 * dy2 - dx2 * dy3) / det;
  const h = (dx1 * dy3 - dx3 * dy1) / det;
  return [
    p1.x - p0.x + g * p1.x,
    p3.x - p0.x + h * p3.x,
    p0.x,
    p1.y - p0.y + g * p1.y,
    p3.y - p0.y + h * p3.y,
    p0.y,
    g,
    h,
    1,
  ];
}

/** The map from a rectangle of that size onto the quadrilateral. */
export function rectangleToQuad(width: number, height: number, quad: Quad): Matrix {
  return chain(unitToQuad(quad), scaling(1 / width, 1 / height));
}
