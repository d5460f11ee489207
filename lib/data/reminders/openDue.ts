import { eq } from 'drizzle-orm';
import { reminder } from '@/db/schema';
import { can } from '@/lib/access/table';
import { asDay, type Day, daysBetween } from '@/lib/domain/days';
import type { DueAnswer } from '@/lib/schemas/reminders';
import { dayOf } from '../days';
import type { SiteTools } from '../verb';
import { loadDue } from './loadDue';

/** Open reminders as one person sees them today, soonest first. */
export async function openDue(
  tools: Pick<SiteTools<unknown>, 'ctx' | 'tx' | 'siteId' | 'person' | 'role'>,
): Promise<{ today: Day; due: DueAnswer[] }> {
  const { ctx, tx, siteId, person, role } = tools;
  const today = dayOf(ctx.now, person.timeZone);
  const rows = await loadDue(tx, siteId, person.id, eq(reminder.state, 'open'));
  const due = rows.map(({ state: _, ...row }) => ({
    ...row,
    siteId,
    inDays: daysBetween(today, asDay(row.dueOn)),
    mayClose: can(role, 'reminder.already-sampled'),
  }));
  return { today, due };
}
