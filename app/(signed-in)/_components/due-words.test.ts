import { describe, expect, it } from 'vitest';
import { isResting, whenDue } from './due-words';

describe('what is due, in words', () => {
  it.each([
    [-8, 'needs-you', 'Due 8 days ago'],
    [-1, 'needs-you', 'Due yesterday'],
    [0, 'needs-you', 'Due today'],
    [1, 'waiting', 'Due tomorrow'],
    [12, 'waiting', 'Due in 12 days'],
  ] as const)('%i days', (inDays, status, words) => {
    expect(whenDue({ inDays })).toEqual({ status, words });
  });

  it('rests until the day asked for, not on it', () => {
    expect(isResting({ snoozedUntil: '2026-05-04' }, '2026-05-03')).toBe(true);
    expect(isResting({ snoozedUntil: '2026-05-04' }, '2026-05-04')).toBe(false);
    expect(isResting({ snoozedUntil: null }, '2026-05-03')).toBe(false);
  });
});
