import { describe, expect, it } from 'vitest';
import {
  addDays,
  addMonths,
  asDay,
  dayFromNumber,
  dayInWords,
  dayNumber,
  dayOfYear,
  daysBetween,
  parseDay,
} from './days';

describe('days', () => {
  it('counts as Hinnant’s civil-day examples do', () => {
    // H. Hinnant, chrono-Compatible Low-Level Date Algorithms: 1970-01-01 is 0, 2000-03-01 is 11017.
    expect(dayNumber(asDay('1970-01-01'))).toBe(0);
    expect(dayNumber(asDay('2000-03-01'))).toBe(11_017);
    expect(dayFromNumber(11_017)).toBe('2000-03-01');
  });

  it('agrees with the platform calendar on every day of 400 years', () => {
    for (let number = dayNumber(asDay('1700-01-01')); number < dayNumber(asDay('2100-01-01')); number += 1) {
      const text = new Date(number * 86_400_000).toISOString().slice(0, 10);
      if (dayFromNumber(number) !== text || dayNumber(asDay(text)) !== number) throw new Error(text);
    }
    expect(daysBetween(asDay('1700-01-01'), asDay('2100-01-01'))).toBe(146_097);
  });

  it('refuses what the calendar does not hold', () => {
    for (const text of ['2026-02-29', '2026-13-01', '2026-00-10', '2026-1-1', '10/04/2026', '', '2026-04-31']) {
      expect(parseDay(text)).toEqual({ ok: false, reason: 'not-a-day' });
    }
    expect(parseDay('2028-02-29').ok).toBe(true);
  });

  it('moves by days and by whole months', () => {
    expect(addDays(asDay('2026-12-31'), 1)).toBe('2027-01-01');
    expect(addMonths(asDay('2026-01-31'), 1)).toBe('2026-02-28');
    expect(addMonths(asDay('2026-01-15'), -24)).toBe('2024-01-15');
  });

  it('gives one number to the same day of leap and other years', () => {
    expect(dayOfYear(asDay('2026-03-01'))).toBe(60);
    expect(dayOfYear(asDay('2028-03-01'))).toBe(60);
    expect(dayOfYear(asDay('2028-02-29'))).toBe(59);
    expect(dayOfYear(asDay('2028-12-31'))).toBe(365);
    expect(dayInWords(asDay('2026-04-10'))).toBe('10 April 2026');
  });
});
