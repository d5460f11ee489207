import { addDays, asDay, type Day, daysBetween } from '@/lib/domain/days';
import { NOTICE_OFFSETS } from '@/lib/domain/reminders';

const STALE_AFTER_DAYS = 7;

/**
 * The notice a reminder asks for today: the latest of its days that has come (two weeks before, the day, two weeks after,
 * or the end of a person's snooze). One that is more than a week old is let go, so that an idle worker wakes to no flood.
 */
export function noticeDay(today: Day, dueOn: string, snoozedUntil: string | null): Day | null {
  const due = asDay(dueOn);
  const days = NOTICE_OFFSETS.map((offset) => addDays(due, offset));
  if (snoozedUntil) {
    const until = asDay(snoozedUntil);
    if (until > today) return null;
    days.push(until);
  }
  const come = days.filter((day) => day <= today && (!snoozedUntil || day >= snoozedUntil)).sort();
  const latest = come.at(-1);
  return latest && daysBetween(latest, today) <= STALE_AFTER_DAYS ? latest : null;
}
