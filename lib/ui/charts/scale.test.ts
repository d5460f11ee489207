import { describe, expect, it } from 'vitest';
import { dayMs, isoDay } from './numbers';
import { ph, phBand, phPoint, potassium } from './sample-data';
import { niceStep, phStep, share, timeSpan, timeTickLabel, timeTicks, valueAxis } from './scale';

describe('phStep', () => {
  it('is 0.2 on a short axis, 0.5 on a tall one', () => {
    expect([1, 1.6].map(phStep)).toEqual([0.2, 0.2]);
    expect([1.7, 5].map(phStep)).toEqual([0.5, 0.5]);
    expect(phStep(6)).toBe(1);
  });
});

describe('valueAxis for pH', () => {
  it('does not start at zero and shows at least one unit', () => {
    const axis = valueAxis([phPoint('a', '2026-04-01', 6.3)], null, ph);
    expect(axis.min).toBeGreaterThan(5);
    expect(axis.max - axis.min).toBeGreaterThanOrEqual(1);
    expect(axis.max).toBeLessThan(7.5);
  });

  it('holds values, ranges and the band, with ends on ticks', () => {
    const axis = valueAxis([phPoint('a', '2026-04-01', 7.9)], phBand, ph);
    expect(axis.min).toBeLessThanOrEqual(6);
    expect(axis.max).toBeGreaterThanOrEqual(8.1);
    expect(axis.ticks[0]).toBe(axis.min);
    expect(axis.ticks.at(-1)).toBe(axis.max);
    expect(axis.ticks.every((t, i) => i === 0 || Math.abs(t - (axis.ticks[i - 1] ?? 0) - 0.5) < 1e-9)).toBe(true);
  });
});

describe('valueAxis for a concentration', () => {
  it('never goes below zero', () => {
    const low = { ...phPoint('a', '2026-04-01', 0.1), low: 0.02, high: 0.4 };
    expect(valueAxis([low], null, potassium).min).toBe(0);
  });

  it('need not start at zero: dots are read by place, not by length', () => {
    const points = [180, 210].map((v, i) => ({ ...phPoint(`p${i}`, `202${i}-04-01`, v), low: null, high: null }));
    expect(valueAxis(points, null, potassium).min).toBeGreaterThan(0);
  });

  it('stands without any value', () => {
    expect(valueAxis([], null, potassium).ticks.length).toBeGreaterThan(1);
  });
});

describe('niceStep', () => {
  it.each([
    [10, 5, 2],
    [0.9, 4, 0.5],
    [230, 5, 50],
    [1, 10, 0.1],
  ])('%d in about %d parts: %d', (span, wanted, step) => {
    expect(niceStep(span, wanted)).toBeCloseTo(step, 12);
  });
});

describe('timeTicks', () => {
  it('stand on first days of months and are not too many', () => {
    const { ticks, months } = timeTicks(dayMs('2022-03-10'), dayMs('2026-06-01'), 5);
    expect(months).toBe(12);
    expect(ticks.map(isoDay)).toEqual(['2023-01-01', '2024-01-01', '2025-01-01', '2026-01-01']);
  });

  it('use months for a short time and name them', () => {
    const { ticks, months } = timeTicks(dayMs('2026-01-15'), dayMs('2026-06-20'), 6);
    expect(months).toBe(1);
    expect(ticks.map((t) => timeTickLabel(t, months))).toEqual([
      'Feb 2026',
      'Mar 2026',
      'Apr 2026',
      'May 2026',
      'Jun 2026',
    ]);
  });
});

describe('timeSpan', () => {
  it('ends on the day the chart is drawn for and leaves air at the left', () => {
    const span = timeSpan([phPoint('a', '2024-04-01', 6), phPoint('b', '2026-04-01', 6)], [], '2026-06-01');
    expect(isoDay(span.toMs)).toBe('2026-06-01');
    expect(span.fromMs).toBeLessThan(dayMs('2024-04-01'));
  });

  it('has width with one test on the very day', () => {
    const span = timeSpan([phPoint('a', '2026-06-01', 6)], [], '2026-06-01');
    expect(span.toMs - span.fromMs).toBeGreaterThan(200 * 86_400_000);
  });

  it('holds an amendment that is later than the day of drawing', () => {
    const span = timeSpan([], [{ id: 'x', on: '2026-07-01', label: 'Lime' }], '2026-06-01');
    expect(isoDay(span.toMs)).toBe('2026-07-01');
  });
});

describe('share', () => {
  it('runs from 0 to 1, and is the middle of nothing', () => {
    expect([share(5, 5, 7), share(6, 5, 7), share(7, 5, 7), share(1, 1, 1)]).toEqual([0, 0.5, 1, 0.5]);
  });
});
