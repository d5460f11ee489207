import { describe, expect, it } from 'vitest';
import { outlineOf } from './geometry';
import { areaText, dayText, lengthNumber, readLength } from './measure';
import { fitView, gridLines, gridStep, scaleBar, toDrawing, toMetres, zoomView } from './viewport';

const size = { width: 900, height: 600 };

describe('fitView', () => {
  it('holds every plot with a margin, in the shape of the drawing', () => {
    const view = fitView([outlineOf({ x: 10, y: 20, width: 30, height: 5 })], undefined, 1.5);
    expect(view.width / view.height).toBeCloseTo(1.5, 10);
    expect(view.x).toBeLessThan(10);
    expect(view.y).toBeLessThan(20);
    expect(view.x + view.width).toBeGreaterThan(40);
    expect(view.y + view.height).toBeGreaterThan(25);
    expect(view.x + view.width / 2).toBeCloseTo(25, 10);
  });

  it('shows some ground when there is no plot yet', () => {
    const view = fitView([], undefined, 1.5);
    expect(view.width).toBeGreaterThan(20);
  });
});

describe('drawing and metres', () => {
  const view = { x: 5, y: 10, width: 45, height: 30 };
  it('has y up on the ground and down in the drawing', () => {
    expect(toDrawing({ x: 5, y: 10 }, view, size)).toEqual({ x: 0, y: 600 });
    expect(toDrawing({ x: 50, y: 40 }, view, size)).toEqual({ x: 900, y: 0 });
  });

  it('goes there and back', () => {
    const back = toMetres(toDrawing({ x: 17.25, y: 31.5 }, view, size), view, size);
    expect(back.x).toBeCloseTo(17.25, 10);
    expect(back.y).toBeCloseTo(31.5, 10);
  });

  it('zooms round the point that is pointed at', () => {
    const at = { x: 20, y: 15 };
    const near = zoomView(view, 2, at);
    expect(near.width).toBeCloseTo(22.5, 10);
    const before = toDrawing(at, view, size);
    const after = toDrawing(at, near, size);
    expect(after.x).toBeCloseTo(before.x, 6);
    expect(after.y).toBeCloseTo(before.y, 6);
  });
});

describe('scale', () => {
  it('is a round number of the unit', () => {
    expect(scaleBar({ x: 0, y: 0, width: 50, height: 30 }, 'm')).toEqual({ metres: 10, label: '10 m' });
    expect(scaleBar({ x: 0, y: 0, width: 50, height: 30 }, 'ft').label).toBe('20 ft');
    expect(scaleBar({ x: 0, y: 0, width: 50, height: 30 }, 'ft').metres).toBeCloseTo(6.096, 10);
  });

  it('draws grid lines on whole steps from the plan’s lower left', () => {
    const view = { x: -1, y: 3, width: 40, height: 20 };
    expect(gridStep(view, 'm')).toBe(1);
    expect(gridLines(view, 5)).toEqual({ xs: [0, 5, 10, 15, 20, 25, 30, 35], ys: [5, 10, 15, 20] });
  });
});

// 1 ft = 0.3048 m exactly (International Yard and Pound Agreement, 1959), so 1,000 sq ft = 92.90304 m2.
describe('units', () => {
  it('shows areas and lengths in the person’s unit', () => {
    expect(areaText(92.90304, 'ft')).toBe('1,000 sq ft');
    expect(areaText(92.90304, 'm')).toBe('92.9 m²');
    expect(lengthNumber(3.048, 'ft')).toBe('10');
    expect(lengthNumber(2.5, 'm')).toBe('2.5');
  });

  it.each([
    ['12.5', 'm', 12.5],
    ['12,5', 'm', 12.5],
    ['10', 'ft', 3.048],
    ['10 ft', 'm', 3.048],
    ["10'", 'm', 3.048],
    ['3 m', 'ft', 3],
  ] as const)('reads %j in a field of %s', (typed, unit, metres) => {
    const read = readLength(typed, unit);
    expect(read.ok && read.metres).toBeCloseTo(metres, 10);
  });

  it.each(['', 'wide', '-3', '1.2.3', '5 yd'])('does not read %j', (typed) => {
    expect(readLength(typed, 'm')).toEqual({ ok: false, reason: 'not-a-length' });
  });

  it('writes the month in letters', () => {
    expect(dayText('2026-05-03')).toBe('3 May 2026');
    expect(dayText('spring')).toBe('spring');
  });
});
