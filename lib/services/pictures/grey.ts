import type { Matrix } from './matrix';
import type { Grey } from './types';

/** Shrinks by a whole number, each new point the mean of its block. */
export function shrink(picture: Grey, by: number): Grey {
  if (by <= 1) return picture;
  const width = Math.max(1, Math.floor(picture.width / by));
  const height = Math.max(1, Math.floor(picture.height / by));
  const data = new Uint8Array(width * height);
  for (let y = 0; y < height; y++) {
    for (let x = 0; x < width; x++) {
      let sum = 0;
      for (let dy = 0; dy < by; dy++) {
        const row = (y * by + dy) * picture.width + x * by;
        for (let dx = 0; dx < by; dx++) sum += picture.data[row + dx] ?? 0;
      }
      data[y * width + x] = Math.round(sum / (by * by));
    }
  }
  return { width, height, data };
}

/** Catmull-Rom weights of the four points around a place between the second and the third, in steps of 1/32. */
const STEPS = 32;
const WEIGHTS = new Float32Array((STEPS + 1) * 4);
for (let step = 0; step <= STEPS; step++) {
  const t = step / STEPS;
  const [t2, t3] = [t * t, t * t * t];
  WEIGHTS.set([(-t3 + 2 * t2 - t) / 2, (3 * t3 - 5 * t2 + 2) / 2, (-3 * t3 + 4 * t2 + t) / 2, (t3 - t2) / 2], step * 4);
}

/** Brightness between the points, with the edge's own points repeated outside. */
function cubic(picture: Grey, x: number, y: number): number {
  const { width, height, data } = picture;
  const [left, top] = [Math.floor(x), Math.floor(y)];
  const [wx, wy] = [Math.round((x - left) * STEPS) * 4, Math.round((y - top) * STEPS) * 4];
  const inside = left >= 1 && top >= 1 && left + 2 < width && top + 2 < height;
  let sum = 0;
  for (let j = 0; j < 4; j++) {
    const row = (inside ? top - 1 + j : Math.min(height - 1, Math.max(0, top - 1 + j))) * width;
    let line = 0;
    for (let i = 0; i < 4; i++) {
      const at = inside ? left - 1 + i : Math.min(width - 1, Math.max(0, left - 1 + i));
      line += (WEIGHTS[wx + i] ?? 0) * (data[row + at] ?? 0);
    }
    sum += (WEIGHTS[wy + j] ?? 0) * line;
  }
  return sum < 0 ? 0 : sum > 255 ? 255 : Math.round(sum);
}

/**
 * A new picture whose every point is looked up through `toSource`; points that fall outside are white. Meant for
 * enlarging or for a mild reduction; shrink first for a strong one.
 */
export function warp(source: Grey, toSource: Matrix, width: number, height: number): Grey {
  const data = new Uint8Array(width * height);
  const [a, b, c, d, e, f, g, h, i] = toSource;
  for (let y = 0; y < height; y++) {
    const py = y + 0.5;
    for (let x = 0; x < width; x++) {
      const px = x + 0.5;
      const w = g * px + h * py + i;
      const sx = (a * px + b * py + c) / w;
      const sy = (d * px + e * py + f) / w;
      const outside = sx < -0.5 || sy < -0.5 || sx > source.width + 0.5 || sy > source.height + 0.5;
      data[y * width + x] = outside ? 255 : cubic(source, sx - 0.5, sy - 0.5);
    }
  }
  return { width, height, data };
}

/** Half a turn, exact. */
export function upsideDown(picture: Grey): Grey {
  return { ...picture, data: Uint8Array.from(picture.data).reverse() };
}

/** A part of the picture, cut at its edges. */
export function part(picture: Grey, box: { x0: number; y0: number; x1: number; y1: number }): Grey {
  const x0 = Math.max(0, Math.floor(box.x0));
  const y0 = Math.max(0, Math.floor(box.y0));
  const width = Math.max(1, Math.min(picture.width, Math.ceil(box.x1)) - x0);
  const height = Math.max(1, Math.min(picture.height, Math.ceil(box.y1)) - y0);
  const data = new Uint8Array(width * height);
  for (let y = 0; y < height; y++) {
    const from = (y0 + y) * picture.width + x0;
    data.set(picture.data.subarray(from, from + width), y * width);
  }
  return { width, height, data };
}
