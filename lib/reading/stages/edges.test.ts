import { expect, it } from 'vitest';
import { partAt } from './edges';

it('counts parts from the left, and none above or below the edges', () => {
  const edges = [
    { x: 200, y0: 100, y1: 300 },
    { x: 400, y0: 100, y1: 200 },
  ];
  expect([100, 300, 500].map((x) => partAt(edges, x, 150))).toEqual([1, 2, 3]);
  expect([100, 300, 500].map((x) => partAt(edges, x, 250))).toEqual([1, 2, 2]);
  expect([50, 100, 300, 350].map((y) => partAt(edges, 250, y))).toEqual([0, 0, 0, 0]);
  expect(partAt([], 250, 150)).toBe(0);
});
