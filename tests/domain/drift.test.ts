import { describe, expect, it } from 'vitest';
import { asDay } from '@/lib/domain/days';
import { type DriftInput, driftOf, readingRange } from '@/lib/domain/drift';
import type { TestPoint } from '@/lib/domain/effects';
import { asLaboratoryId } from '@/lib/domain/ids';
import { NO_LEARNING, testPoint } from '../support/test-points';

const yearly = (values: readonly number[], more: Partial<TestPoint> = {}, first = 2018): TestPoint[] =>
  values.map((value, index) => testPoint('a', `${first + index}-04-10`, value, more));

const drift = (tests: readonly TestPoint[], more: Partial<DriftInput> = {}) =>
  driftOf({
    analyte: 'soil_ph_water',
    tests,
    applications: [],
    noise: NO_LEARNING,
    target: { low: 6.0, high: 6.8 },
    hardWaterOrFreeLime: false,
    ...more,
  });

describe('the 95 % range of one reading', () => {
  it('joins the plot’s error with the occasion’s', () => {
    // sd = sqrt(0.25^2/15 + 2 x 0.06^2 + 0.08^2) = 0.1332917 at 14.84 df; R 4.2.2: qt(0.975, 14.84026) = 2.13345.
    const range = readingRange(testPoint('a', '2026-04-10', 6.5), NO_LEARNING);
    expect(range?.high).toBeCloseTo(6.5 + 2.13345 * 0.1332917, 5);
    expect((range?.high ?? 0) + (range?.low ?? 0)).toBeCloseTo(13, 10);
  });

  it('has none for a value against a limit or without a noise figure', () => {
    expect(
      readingRange(testPoint('a', '2026-04-10', 0.2, { analyte: 'boron', qualifier: 'below' }), NO_LEARNING),
    ).toBeNull();
    expect(readingRange(testPoint('a', '2026-04-10', 0.2, { analyte: 'ec' }), NO_LEARNING)).toBeNull();
  });
});

describe('breaks', () => {
  it('stop the line where method, depth or laboratory change, and name the reason', () => {
    const tests = [
      ...yearly([6.8, 6.7], { method: '1:2_water' }),
      ...yearly([6.6], {}, 2020),
      ...yearly([6.5], { depthCm: { from: 0, to: 20 } }, 2021),
      ...yearly([6.4], { depthCm: { from: 0, to: 20 }, laboratoryId: asLaboratoryId('other') }, 2022),
    ];
    const view = drift(tests);
    expect(view.breaks.map((gap) => gap.reason)).toEqual(['method', 'depth', 'laboratory']);
    expect(view.points.map((point) => point.run)).toEqual([0, 0, 1, 2, 3]);
    expect(view.trend.ok).toBe(false);
  });
});

describe('trend', () => {
  it('is not stated from fewer than four tests', () => {
    const { trend, forecast } = drift(yearly([6.8, 6.7, 6.6]));
    expect(trend).toMatchObject({ ok: false, reason: 'too-few-tests' });
    expect(trend.sentence).toContain('there are 3');
    expect(forecast.ok).toBe(false);
  });

  it('leaves tests of another season out', () => {
    const spring = yearly([6.8, 6.7, 6.6, 6.5]);
    const fall = testPoint('a', '2020-10-10', 5.9);
    const view = drift([...spring, fall]);
    expect(view.points.filter((point) => point.inTrend)).toHaveLength(4);
    expect(view.trend.ok && view.trend.tests).toBe(4);
  });

  it('finds the slope of a straight series in pH a year', () => {
    const { trend } = drift(yearly([7.0, 6.9, 6.8, 6.7, 6.6, 6.5, 6.4, 6.3]));
    if (!trend.ok) throw new Error(trend.sentence);
    // 0.1 a year of 365.25 days, while the calendar years differ by a day.
    expect(trend.perYear).toBeCloseTo(-0.1, 3);
    expect(trend.sen?.slope).toBeCloseTo(-0.1, 3);
    expect(trend.df).toBe(14);
    expect(trend.sentence).toMatch(/^pH falls by 0\.10 a year \(0\.\d\d to 0\.\d\d, 8 tests\)\.$/);
  });

  it('allows for a step at an application', () => {
    // The yearly values of vector step-trend: slope -0.043 and step 0.497 (R lm).
    const tests = yearly([7.0, 6.95, 6.9, 6.88, 7.32, 7.3, 7.21, 7.2], {}, 2017);
    const applications = [{ day: asDay('2020-06-01'), label: 'Limestone' }];
    const { trend } = drift(tests, { applications });
    if (!trend.ok) throw new Error(trend.sentence);
    expect(trend.steps).toBe(1);
    expect(trend.perYear).toBeCloseTo(-0.043, 3);
    expect(trend.sen).toBeNull();
    const without = drift(tests).trend;
    expect(without.ok && without.perYear).toBeGreaterThan(0);
  });

  it('states none when the line and the middle slope point in opposite directions', () => {
    const { trend } = drift(yearly([6.5, 6.51, 6.52, 6.53, 5.9]));
    expect(trend).toMatchObject({ ok: false, reason: 'slopes-disagree' });
  });

  it('says that nothing is seen when zero is inside', () => {
    const { trend } = drift(yearly([6.5, 6.45, 6.5, 6.45]));
    expect(trend.sentence).toContain('No drift of pH is seen in 4 tests');
  });
});

describe('forecast', () => {
  const steep = yearly([7.0, 6.88, 6.76, 6.64, 6.52, 6.4]);

  it('names the day on which the lower edge is reached, with an interval around it', () => {
    const { forecast } = drift(steep);
    if (!forecast.ok) throw new Error(forecast.sentence);
    // 0.4 left at 0.12 a year: 3 1/3 years after 10 April 2023.
    expect(forecast.day.slice(0, 7)).toBe('2026-08');
    expect(forecast.from < forecast.day && forecast.day < forecast.until).toBe(true);
    expect(forecast.rough).toBe(false);
    expect(forecast.retestBy <= '2026-04-10').toBe(true);
  });

  it('refuses a date when the slope is not settled, outside the band, or without a band', () => {
    const reason = (view: ReturnType<typeof drift>) => (view.forecast.ok ? 'answered' : view.forecast.reason);
    expect(reason(drift(yearly([6.6, 6.5, 6.55, 6.45])))).toBe('slope-not-settled');
    expect(reason(drift(steep, { target: { low: 6.5 } }))).toBe('outside-already');
    expect(reason(drift(steep, { target: { high: 6.8 } }))).toBe('no-band');
    expect(reason(drift(steep.slice(0, 3)))).toBe('no-trend');
  });
});

describe('what to expect a year', () => {
  it('is the prior until three tests join it', () => {
    expect(drift(yearly([6.8, 6.7])).expected).toEqual({ perYear: -0.03, sd: 0.05, joined: false });
    expect(drift([], { hardWaterOrFreeLime: true }).expected).toEqual({ perYear: 0, sd: 0.05, joined: false });
    const joined = drift(yearly([6.8, 6.6, 6.4])).expected;
    expect(joined?.joined).toBe(true);
    expect(joined?.perYear).toBeLessThan(-0.03);
    expect(joined?.sd).toBeLessThan(0.05);
  });
});
