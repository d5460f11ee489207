import { describe, expect, it } from 'vitest';
import { asDay } from '../days';
import { dayAfterWarmMonths, defaultWarmMonths, isSameSeason, seasonGap, seasonOf, warmMonthsBetween } from '.';

const north = defaultWarmMonths('north');
const south = defaultWarmMonths('south');

describe('seasons', () => {
  it('names them by hemisphere', () => {
    expect(seasonOf(asDay('2026-04-10'), 'north')).toBe('spring');
    expect(seasonOf(asDay('2026-04-10'), 'south')).toBe('fall');
    expect(seasonOf(asDay('2026-12-01'), 'north')).toBe('winter');
    expect(seasonOf(asDay('2026-12-01'), 'south')).toBe('summer');
  });

  it('measures on the circle of the year, also across New Year and between years', () => {
    expect(seasonGap(asDay('2025-12-20'), asDay('2026-01-10'))).toBe(21);
    expect(seasonGap(asDay('2020-04-10'), asDay('2026-11-25'))).toBe(136);
    expect(isSameSeason(asDay('2025-04-01'), asDay('2026-05-16'))).toBe(true);
    expect(isSameSeason(asDay('2025-04-01'), asDay('2026-05-17'))).toBe(false);
  });
});

describe('warm months', () => {
  it('counts 30 warm days as one', () => {
    expect(warmMonthsBetween(asDay('2026-04-30'), asDay('2026-05-30'), north)).toBeCloseTo(1, 12);
    expect(warmMonthsBetween(asDay('2026-11-01'), asDay('2027-03-31'), north)).toBe(0);
    expect(warmMonthsBetween(asDay('2026-11-01'), asDay('2026-12-01'), south)).toBeCloseTo(1, 12);
    expect(warmMonthsBetween(asDay('2026-06-01'), asDay('2026-05-01'), north)).toBe(0);
  });

  it('has seven warm months by default in both hemispheres', () => {
    expect(north.filter(Boolean)).toHaveLength(7);
    expect(south.filter(Boolean)).toHaveLength(7);
    expect([south[0], south[5], south[9]]).toEqual([true, false, true]);
  });

  it('finds the day, or says that it never comes', () => {
    expect(dayAfterWarmMonths(asDay('2026-10-31'), 1, north, 400)).toEqual({ ok: true, day: '2027-04-30' });
    expect(dayAfterWarmMonths(asDay('2026-10-31'), 1, north, 100)).toEqual({ ok: false, reason: 'never-warm-enough' });
  });
});
