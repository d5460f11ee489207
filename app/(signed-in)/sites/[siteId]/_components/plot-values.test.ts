import { describe, expect, it } from 'vitest';
import type { Plot } from '@/lib/schemas/plots';
import { areaOf, boundsOf, outlineOf } from '@/lib/ui/site-plan/geometry';
import { asPlotValues, changedFields, plotValues, readPlotValues } from './plot-values';

const plot: Plot = {
  id: 'p',
  name: 'North bed',
  outline: [...outlineOf({ x: 1.111, y: 2, width: 3.048, height: 6.096 })],
  outlineSince: '2026-01-01',
  areaTypedM2: null,
  area: { m2: 18.58, from: 'outline' },
  texture: 'light',
  established: false,
  freeLimeSeen: true,
  targetSetKey: null,
  notes: '',
  archivedAt: null,
  version: 3,
  planting: { id: 'c', year: 2026, crop: 'Leek', targetSetKey: null, plannedOn: null },
  lastTest: null,
};
const before = plotValues(plot, 'ft');
const read = (change: Partial<typeof before>) => readPlotValues({ ...before, ...change }, before, plot.outline, 'ft');

describe('plotValues', () => {
  it('shows feet where feet are wanted', () => {
    expect(before).toMatchObject({ width: '10', length: '20', established: 'no', freeLimeSeen: 'on', crop: 'Leek' });
  });

  it('takes an unticked box as empty', () => {
    const { freeLimeSeen: _, ...rest } = before;
    expect(changedFields(asPlotValues(rest), before)).toEqual(['freeLimeSeen']);
  });
});

describe('readPlotValues', () => {
  it('sends nothing that was not touched', () => {
    expect(read({})).toEqual({ ok: true, plot: {}, planting: 'unchanged' });
  });

  it('keeps the exact numbers of the sides that were left alone', () => {
    const answer = read({ width: '20' });
    const outline = answer.ok ? answer.plot.outline : null;
    expect(boundsOf(outline ?? [])?.minX).toBe(1.111);
    expect(areaOf(outline ?? [])).toBeCloseTo(6.096 * 6.096, 9);
  });

  it('takes the plot off the plan when both sides are emptied, and asks when one is', () => {
    expect(read({ width: '', length: '' })).toMatchObject({ ok: true, plot: { outline: null } });
    expect(read({ width: '' })).toMatchObject({ ok: false, errors: { width: expect.stringContaining('both') } });
  });

  // 1 sq ft = 0.09290304 m2 exactly (1 ft = 0.3048 m, International Yard and Pound Agreement, 1959).
  it('reads a typed area in the person’s unit, or in the one written behind it', () => {
    expect(read({ areaTypedM2: '1,000.0' })).toMatchObject({ plot: { areaTypedM2: 92.903 } });
    expect(read({ areaTypedM2: '400 m2' })).toMatchObject({ plot: { areaTypedM2: 400 } });
    expect(read({ areaTypedM2: '0' })).toMatchObject({ ok: false });
    expect(read({ areaTypedM2: '1,500' })).toMatchObject({ ok: false });
  });

  it('sets, changes and takes away the crop of the year', () => {
    expect(read({ crop: 'Marrow' })).toMatchObject({ planting: { crop: 'Marrow', targetSetKey: null } });
    expect(read({ crop: ' ' })).toMatchObject({ planting: 'none' });
    expect(read({ crop: '', cropSetKey: 'vegetables-1' })).toMatchObject({ ok: false });
  });

  it('asks for a name', () => {
    expect(read({ name: ' ' })).toMatchObject({ ok: false, errors: { name: 'Give the plot a name.' } });
  });
});
