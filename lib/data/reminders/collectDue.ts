import { and, desc, eq, inArray, sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Transaction } from '@/db/client';
import { membership, reminder, sample } from '@/db/schema';
import { can, ROLES } from '@/lib/access/table';
import { addDays, asDay, type Day } from '@/lib/domain/days';
import { asPersonId, asSiteId, type SiteId } from '@/lib/domain/ids';
import { database } from '../database';
import { dayOf, hourOf } from '../days';
import { noticesSent } from '../mail/noticesSent';
import { type MailReader, mailReaders } from '../people/mailReaders';
import { withPeople, withSite } from '../transaction';
import { workerVerb } from '../verb';
import { loadDue } from './loadDue';
import { noticeDay } from './stages';

const QUIET_FROM_HOUR = 20;
const RECEIVING_ROLES = ROLES.filter((role) => can(role, 'reminder.already-sampled'));

export type DueNotice = {
  siteId: SiteId;
  reminderId: string;
  plotId: string;
  plotName: string;
  siteName: string;
  dueOn: Day;
  noticeOn: Day;
  reason: string;
  lastSample: { cores: number | null; depthFromCm: number | null; depthToCm: number | null } | null;
};
export type DueLetter = { reader: MailReader; today: Day; notices: DueNotice[] };

/** The newest bag of each plot of a site. */
async function lastSamples(tx: Transaction, siteId: SiteId): Promise<Map<string, DueNotice['lastSample']>> {
  const { plotId, cores, depthFromCm, depthToCm, takenOn } = sample;
  const rows = await tx
    .selectDistinctOn([plotId], { plotId, cores, depthFromCm, depthToCm })
    .from(sample)
    .where(eq(sample.siteId, siteId))
    .orderBy(plotId, desc(takenOn));
  const number = (text: string | null) => (text === null ? null : Number(text));
  return new Map(
    rows.map((row) => [
      row.plotId,
      { cores: row.cores, depthFromCm: number(row.depthFromCm), depthToCm: number(row.depthToCm) },
    ]),
  );
}

async function dueOnSite(tx: Transaction, siteId: SiteId, ids: string[], now: Date) {
  const members = await tx
    .select({ personId: membership.personId })
    .from(membership)
    .where(and(eq(membership.siteId, siteId), inArray(membership.role, RECEIVING_ROLES)));
  const readers = await mailReaders(
    tx,
    members.map((member) => member.personId),
    'reminder',
  );
  const samples = await lastSamples(tx, siteId);
  const found: { reader: MailReader; notice: DueNotice }[] = [];
  for (const reader of readers) {
    const hour = hourOf(now, reader.timeZone);
    if (hour < reader.mailHour || hour >= Math.max(QUIET_FROM_HOUR, reader.mailHour + 1)) continue;
    const rows = await loadDue(
      tx,
      siteId,
      asPersonId(reader.id),
      and(inArray(reminder.id, ids), eq(reminder.state, 'open')),
    );
    for (const row of rows) {
      const noticeOn = noticeDay(dayOf(now, reader.timeZone), row.dueOn, row.snoozedUntil);
      if (!noticeOn) continue;
      const notice = {
        siteId,
        reminderId: row.id,
        plotId: row.plotId,
        plotName: row.plotName,
        siteName: row.siteName,
        dueOn: asDay(row.dueOn),
        noticeOn,
        reason: row.reason,
        lastSample: samples.get(row.plotId) ?? null,
      };
      found.push({ reader, notice });
    }
  }
  return found;
}

/** What every person should hear about now, over all their sites, without what they were already told. */
export const collectDue = workerVerb({
  input: z.strictObject({}),
  run: async ({ ctx }): Promise<DueLetter[]> => {
    // A day ahead of UTC is the latest "today" anywhere; the first notice comes two weeks early.
    const latest = addDays(dayOf(ctx.now, 'UTC'), 15);
    const rows = await database().execute<{ site_id: string; reminder_id: string }>(
      sql`select site_id, reminder_id from due_reminders(${latest}::date)`,
    );
    const bySite = new Map<string, string[]>();
    for (const row of rows) bySite.set(row.site_id, [...(bySite.get(row.site_id) ?? []), row.reminder_id]);
    const letters = new Map<string, DueLetter>();
    for (const [id, ids] of bySite) {
      const siteId = asSiteId(id);
      for (const { reader, notice } of await withSite(siteId, (tx) => dueOnSite(tx, siteId, ids, ctx.now))) {
        const letter = letters.get(reader.id) ?? { reader, today: dayOf(ctx.now, reader.timeZone), notices: [] };
        letter.notices.push(notice);
        letters.set(reader.id, letter);
      }
    }
    const open: DueLetter[] = [];
    for (const letter of letters.values()) {
      const about = letter.notices.map((notice) => notice.reminderId);
      const told = await withPeople((tx) => noticesSent(tx, letter.reader.id, about));
      const notices = letter.notices.filter((notice) => !told.has(`${notice.reminderId} ${notice.noticeOn}`));
      if (notices.length > 0) open.push({ ...letter, notices });
    }
    return open;
  },
});
