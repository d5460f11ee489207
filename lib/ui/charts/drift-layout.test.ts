import { describe, expect, it } from 'vitest';
import { driftLayout, type LayoutInput } from './drift-layout';
import { boron, boronHistory, manyAmendments, ph, phBand, phBroken, phHistory, sulfur } from './sample-data';

const base: LayoutInput = {
  analyte: ph,
  points: phHistory,
  amendments: sulfur,
  band: phBand,
  asOf: '2026-06-01',
  width: 800,
  height: 340,
};

describe('driftLayout', () => {
  it.each([320, 390, 800, 1200])('keeps everything inside a box %d wide', (width) => {
    const { plot, points, amendments, last, xTicks } = driftLayout({ ...base, width });
    expect(plot.right).toBeLessThanOrEqual(width);
    for (const p of points) {
      expect(p.x).toBeGreaterThanOrEqual(plot.left);
      expect(p.x).toBeLessThanOrEqual(plot.right);
      expect(p.whisker?.top).toBeGreaterThanOrEqual(plot.top - 0.001);
      expect(p.whisker?.bottom).toBeLessThanOrEqual(plot.bottom + 0.001);
    }
    for (const a of amendments) expect(a.x).toBeGreaterThan(plot.left);
    expect(last?.x).toBeLessThan(width - 30);
    expect(xTicks.length).toBeGreaterThanOrEqual(2);
  });

  it('places time truly: equal years apart, equal distances', () => {
    const { points } = driftLayout(base);
    const [a, b, c] = points.map((p) => p.x);
    if (a === undefined || b === undefined || c === undefined) throw new Error('points missing');
    // 362 and 372 days between the first three tests.
    expect((c - b) / (b - a)).toBeCloseTo(372 / 362, 6);
  });

  it('writes words under two amendments and numbered flags under six', () => {
    expect(driftLayout(base).amendments.map((a) => a.text)).toEqual(['Sulfur 9 lb', 'Sulfur 6 lb']);
    const many = driftLayout({ ...base, amendments: manyAmendments });
    expect(many.flags).toBe(true);
    expect(many.amendments.map((a) => a.text)).toEqual(['1', '2', '3', '4', '5', '6']);
    expect(many.amendments.map((a) => a.amendment.id)).toEqual(['a3', 'a4', 'a1', 'a2', 'a5', 'a6']);
  });

  it('uses flags where the words would run into each other, and stacks flags that would', () => {
    const close = [
      { id: 'x', on: '2025-05-06', label: 'Sulfur 6 lb' },
      { id: 'y', on: '2025-05-09', label: 'Borax 2 oz' },
    ];
    const layout = driftLayout({ ...base, amendments: close });
    expect(layout.flags).toBe(true);
    expect(layout.amendments.map((a) => a.row)).toEqual([0, 1]);
  });

  it('draws no line across a break and puts the break between its tests', () => {
    const layout = driftLayout({ ...base, points: phBroken });
    expect(layout.lines).toHaveLength(3);
    expect(layout.breaks).toHaveLength(1);
    const [, , before, after] = layout.points;
    const at = layout.breaks[0]?.x ?? 0;
    expect(at).toBeGreaterThan(before?.x ?? Number.POSITIVE_INFINITY);
    expect(at).toBeLessThan(after?.x ?? 0);
  });

  it('gives a result below the limit no whisker', () => {
    const layout = driftLayout({ ...base, analyte: boron, points: boronHistory, band: null, amendments: [] });
    expect(layout.points.map((p) => p.whisker === null)).toEqual([true, true, false, false]);
  });

  it('puts a result below an unknown limit at the foot, without letting it stretch the axis', () => {
    const [first, ...rest] = phHistory;
    if (first === undefined) throw new Error('no sample');
    const unknown = {
      ...first,
      value: 0,
      printed: 'not detected',
      qualifier: 'below-unknown',
      low: null,
      high: null,
    } as const;
    const layout = driftLayout({ ...base, points: [unknown, ...rest] });
    expect(layout.valueDomain[0]).toBeGreaterThan(5);
    const y = layout.points[0]?.y ?? 0;
    expect(y).toBeLessThan(layout.plot.bottom);
    expect(y).toBeGreaterThan(layout.plot.bottom - 12);
  });

  it('ends the datum line at the last value', () => {
    const layout = driftLayout(base);
    expect(layout.last?.label).toBe('6.6');
    expect(layout.datum.endsWith(`${layout.last?.x} ${layout.last?.y}`)).toBe(true);
    expect(layout.last?.y).toBe(layout.points.at(-1)?.y);
  });

  it('stands with no test at all', () => {
    const layout = driftLayout({ ...base, points: [], amendments: [] });
    expect(layout.last).toBeNull();
    expect(layout.datum).not.toContain('C');
  });

  it('an open band reaches the edge of the axis and has one drawn edge', () => {
    const layout = driftLayout({ ...base, band: { ...phBand, high: null } });
    expect(layout.band?.hasTop).toBe(false);
    expect(layout.band?.hasBottom).toBe(true);
    expect(layout.band?.top).toBe(layout.plot.top);
  });
});
