import { describe, expect, it } from 'vitest';
import { asDay } from '@/lib/domain/days';
import { noticeDay } from './stages';

const notice = (today: string, snoozedUntil: string | null = null) =>
  noticeDay(asDay(today), '2026-05-20', snoozedUntil);

describe('the notice a reminder asks for', () => {
  it('comes two weeks before, on the day and two weeks after', () => {
    expect(notice('2026-05-05')).toBeNull();
    expect(notice('2026-05-06')).toBe('2026-05-06');
    expect(notice('2026-05-20')).toBe('2026-05-20');
    expect(notice('2026-06-03')).toBe('2026-06-03');
  });

  it('is still asked for when the worker was away for some days, and let go after a week', () => {
    expect(notice('2026-05-13')).toBe('2026-05-06');
    expect(notice('2026-05-14')).toBeNull();
    expect(notice('2026-06-10')).toBe('2026-06-03');
    expect(notice('2026-06-11')).toBeNull();
  });

  it('rests while snoozed and comes on the day the snooze ends', () => {
    expect(notice('2026-05-20', '2026-05-25')).toBeNull();
    expect(notice('2026-05-25', '2026-05-25')).toBe('2026-05-25');
    expect(notice('2026-06-03', '2026-05-25')).toBe('2026-06-03');
  });
});
