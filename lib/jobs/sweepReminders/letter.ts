import type { DueLetter, DueNotice } from '@/lib/data/reminders/collectDue';
import { dayInWords } from '@/lib/domain/days';
import { reminderDigest } from '@/lib/emails/reminder-digest';
import { reminderDue } from '@/lib/emails/reminder-due';
import type { Email, ReminderItem } from '@/lib/emails/types';
import { resampleCalendar } from '@/lib/services/calendar/ics';

function sampleLikeThis(notice: DueNotice, units: 'us' | 'metric'): string {
  const last = notice.lastSample;
  const cores = last?.cores ? `${last.cores} cores, ` : '';
  if (!last || last.depthToCm === null) return `${cores}the same depth and the same laboratory as last time`;
  const shown = (cm: number) => (units === 'us' ? Math.round((cm / 2.54) * 10) / 10 : Math.round(cm * 10) / 10);
  const unit = units === 'us' ? 'in' : 'cm';
  return `${cores}${shown(last.depthFromCm ?? 0)} to ${shown(last.depthToCm)} ${unit} deep, the same laboratory as last time`;
}

const itemOf = (origin: string, actionUrl: string, notice: DueNotice, units: 'us' | 'metric'): ReminderItem => ({
  plotName: notice.plotName,
  siteName: notice.siteName,
  dueOn: dayInWords(notice.dueOn),
  because: notice.reason,
  sampleLikeThis: sampleLikeThis(notice, units),
  plotUrl: `${origin}/sites/${notice.siteId}/plots/${notice.plotId}`,
  alreadySampledUrl: `${actionUrl}&reminder=${notice.reminderId}&do=already-sampled`,
  snoozeUrl: `${actionUrl}&reminder=${notice.reminderId}&do=snooze`,
});

/** The letter of one person and day: one plot gets a letter of its own, several share a digest. */
export async function reminderLetter(
  origin: string,
  letter: DueLetter,
  secrets: { action: string; unsubscribe: string },
): Promise<Email> {
  const actionUrl = `${origin}/reminder?token=${secrets.action}`;
  const links = {
    name: letter.reader.name,
    unsubscribeUrl: `${origin}/unsubscribe?token=${secrets.unsubscribe}`,
    preferencesUrl: `${origin}/account`,
  };
  const items = letter.notices.map((notice) => itemOf(origin, actionUrl, notice, letter.reader.units));
  const [only] = items;
  if (only && items.length === 1) return reminderDue({ ...links, item: only });
  return reminderDigest({ ...links, day: dayInWords(letter.today), items });
}

export const calendarOf = (notice: DueNotice, stamp: Date) => ({
  filename: `soil-sample-${notice.dueOn}-${notice.reminderId.slice(0, 8)}.ics`,
  content: resampleCalendar({
    uid: `${notice.reminderId}@loamline`,
    sequence: 0,
    plotName: notice.plotName,
    siteName: notice.siteName,
    dueOn: notice.dueOn,
    stamp,
    cancelled: false,
  }),
  contentType: 'text/calendar; charset=utf-8; method=PUBLISH',
});
