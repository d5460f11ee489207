import { describe, expect, it } from 'vitest';
import {
  areaOf,
  asRectangle,
  boundsOf,
  dragCorner,
  isInside,
  labelSpot,
  moveBy,
  outlineOf,
  overlaps,
  rectangleBetween,
  resizeTo,
  snap,
} from './geometry';
import type { PlanOutline } from './types';

const square = (x: number, y: number, side: number): PlanOutline => outlineOf({ x, y, width: side, height: side });

describe('areaOf', () => {
  it('is width times height of a rectangle, whichever way round it is walked', () => {
    const outline = outlineOf({ x: 3, y: 7, width: 12.5, height: 4 });
    expect(areaOf(outline)).toBe(50);
    expect(areaOf([...outline].reverse())).toBe(50);
  });

  it('is half base times height of a triangle', () => {
    const triangle = [
      { x: 0, y: 0 },
      { x: 10, y: 0 },
      { x: 3, y: 8 },
    ];
    expect(areaOf(triangle)).toBe(40);
  });

  it('takes the notch out of an L', () => {
    const ell = [
      { x: 0, y: 0 },
      { x: 6, y: 0 },
      { x: 6, y: 2 },
      { x: 2, y: 2 },
      { x: 2, y: 5 },
      { x: 0, y: 5 },
    ];
    expect(areaOf(ell)).toBe(6 * 5 - 4 * 3);
  });

  // Formula as published: B. Braden, The Surveyor's Area Formula, The College Mathematics Journal 17 (1986). The pentagon is
  // cut by hand into the rectangle 4 x 3 and the triangle on top of it, base 4 and height 2.
  it('agrees with a pentagon cut into a rectangle and a triangle', () => {
    const house = [
      { x: 1, y: 1 },
      { x: 5, y: 1 },
      { x: 5, y: 4 },
      { x: 3, y: 6 },
      { x: 1, y: 4 },
    ];
    expect(areaOf(house)).toBe(4 * 3 + (4 * 2) / 2);
  });

  it('comes near that of a circle with many corners', () => {
    const corners = Array.from({ length: 720 }, (_, index) => {
      const angle = (index / 720) * 2 * Math.PI;
      return { x: 10 + 5 * Math.cos(angle), y: 10 + 5 * Math.sin(angle) };
    });
    expect(areaOf(corners)).toBeCloseTo(Math.PI * 25, 2);
  });

  it('is nothing for fewer than three corners', () => {
    expect(areaOf([])).toBe(0);
    expect(areaOf([{ x: 1, y: 1 }])).toBe(0);
  });
});

describe('rectangles', () => {
  it('are known from their outline, and other shapes are not', () => {
    expect(asRectangle(outlineOf({ x: 1, y: 2, width: 3, height: 4 }))).toEqual({ x: 1, y: 2, width: 3, height: 4 });
    const kite = [
      { x: 0, y: 1 },
      { x: 1, y: 0 },
      { x: 2, y: 1 },
      { x: 1, y: 2 },
    ];
    expect(asRectangle(kite)).toBeNull();
    const bow = [
      { x: 0, y: 0 },
      { x: 2, y: 2 },
      { x: 2, y: 0 },
      { x: 0, y: 2 },
    ];
    expect(asRectangle(bow)).toBeNull();
    expect(asRectangle(square(0, 0, 2).slice(0, 3))).toBeNull();
  });

  it('are drawn between any two corners, snapped to a quarter metre', () => {
    expect(rectangleBetween({ x: 5.1, y: 3.9 }, { x: 1.13, y: 0.86 })).toEqual({
      x: 1.25,
      y: 0.75,
      width: 3.75,
      height: 3.25,
    });
    expect(rectangleBetween({ x: 1, y: 1 }, { x: 1, y: 1 })).toEqual({ x: 1, y: 1, width: 0.5, height: 0.5 });
  });

  it('keep the opposite corner when one is dragged, also past it', () => {
    const outline = outlineOf({ x: 2, y: 2, width: 4, height: 3 });
    expect(boundsOf(dragCorner(outline, 2, { x: 8.1, y: 7 }))).toEqual({ minX: 2, minY: 2, maxX: 8, maxY: 7 });
    expect(boundsOf(dragCorner(outline, 2, { x: 0, y: 0 }))).toEqual({ minX: 0, minY: 0, maxX: 2, maxY: 2 });
  });
});

describe('moving and resizing', () => {
  it('snaps and stays on the plan', () => {
    expect(snap(0.37)).toBe(0.25);
    expect(boundsOf(moveBy(square(1, 1, 2), { x: 0.6, y: -9 }))).toEqual({ minX: 1.5, minY: 0, maxX: 3.5, maxY: 2 });
  });

  it('a move leaves the area alone', () => {
    const triangle = [
      { x: 0, y: 0 },
      { x: 3.3, y: 0 },
      { x: 1, y: 2.7 },
    ];
    expect(areaOf(moveBy(triangle, { x: 4, y: 2.5 }))).toBeCloseTo(areaOf(triangle), 10);
  });

  it('holds the lower left and never goes under half a metre', () => {
    expect(boundsOf(resizeTo(square(2, 3, 4), 6, 0.1))).toEqual({ minX: 2, minY: 3, maxX: 8, maxY: 3.5 });
  });

  it('moves one corner of a free shape', () => {
    const triangle = [
      { x: 0, y: 0 },
      { x: 4, y: 0 },
      { x: 0, y: 4 },
    ];
    expect(dragCorner(triangle, 1, { x: 6.1, y: -3 })).toEqual([triangle[0], { x: 6, y: 0 }, triangle[2]]);
  });
});

describe('overlaps', () => {
  it('sees crossing, nested and equal shapes', () => {
    expect(overlaps(square(0, 0, 4), square(2, 2, 4))).toBe(true);
    expect(overlaps(square(0, 0, 9), square(2, 2, 1))).toBe(true);
    expect(overlaps(square(0, 0, 4), square(0, 0, 4))).toBe(true);
  });

  it('does not count a shared side, a corner or a gap', () => {
    expect(overlaps(square(0, 0, 4), square(4, 0, 4))).toBe(false);
    expect(overlaps(square(0, 0, 4), square(4, 4, 4))).toBe(false);
    expect(overlaps(square(0, 0, 4), square(9, 0, 4))).toBe(false);
  });

  it('is not fooled by boxes that meet where the shapes do not', () => {
    const lower = [
      { x: 0, y: 0 },
      { x: 4, y: 0 },
      { x: 0, y: 4 },
    ];
    const upper = [
      { x: 4, y: 1 },
      { x: 4, y: 4 },
      { x: 1, y: 4 },
    ];
    expect(overlaps(lower, upper)).toBe(false);
  });
});

describe('isInside', () => {
  it('tells inside from outside', () => {
    expect(isInside(square(1, 1, 2), { x: 2, y: 2 })).toBe(true);
    expect(isInside(square(1, 1, 2), { x: 4, y: 2 })).toBe(false);
  });
});

describe('labelSpot', () => {
  it('is the middle of a rectangle', () => {
    expect(labelSpot(outlineOf({ x: 2, y: 2, width: 4, height: 3 }))).toEqual({
      at: { x: 4, y: 3.5 },
      width: 4,
      height: 3,
    });
  });

  it('lies inside an L, whose own middle does not', () => {
    const ell = [
      { x: 0, y: 0 },
      { x: 12, y: 0 },
      { x: 12, y: 3 },
      { x: 3, y: 3 },
      { x: 3, y: 12 },
      { x: 0, y: 12 },
    ];
    expect(isInside(ell, { x: 6, y: 6 })).toBe(false);
    const { at, width, height } = labelSpot(ell);
    expect(isInside(ell, at)).toBe(true);
    expect(width).toBeGreaterThan(2.5);
    for (const x of [-1, 1]) {
      for (const y of [-1, 1]) {
        expect(isInside(ell, { x: at.x + x * (width / 2 - 0.01), y: at.y + y * (height / 2 - 0.01) })).toBe(true);
      }
    }
  });
});
