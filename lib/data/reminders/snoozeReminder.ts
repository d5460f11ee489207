import { and, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { reminder, reminderSnooze } from '@/db/schema';
import { addDays } from '@/lib/domain/days';
import type { PersonId, SiteId } from '@/lib/domain/ids';
import { notFound, Problem } from '@/lib/errors';
import { snoozeInput } from '@/lib/schemas/reminders';
import { dayOf } from '../days';
import { siteVerb } from '../verb';

export async function snoozeInSite(
  tx: Transaction,
  siteId: SiteId,
  personId: PersonId,
  reminderId: string,
  until: string,
): Promise<void> {
  const rows = await tx
    .select({ state: reminder.state })
    .from(reminder)
    .where(and(eq(reminder.siteId, siteId), eq(reminder.id, reminderId)));
  const row = rows[0];
  if (!row) throw notFound();
  if (row.state !== 'open')
    throw new Problem('conflict', 'This reminder is already closed; nothing more is sent for it.');
  await tx
    .insert(reminderSnooze)
    .values({ siteId, reminderId, personId, until })
    .onConflictDoUpdate({
      target: [reminderSnooze.siteId, reminderSnooze.reminderId, reminderSnooze.personId],
      set: { until },
    });
}

/** One person's rest from a reminder; the others still hear of it. */
export const snoozeReminder = siteVerb({
  act: 'self.manage',
  input: snoozeInput,
  run: async ({ ctx, tx, siteId, person, input }) => {
    const today = dayOf(ctx.now, person.timeZone);
    if (input.until <= today || input.until > addDays(today, 366)) {
      throw new Problem('invalid', 'Choose a day after today and within a year.', {
        fields: { until: 'Choose a day after today and within a year.' },
      });
    }
    await snoozeInSite(tx, siteId, person.id, input.reminderId, input.until);
    return { done: true as const };
  },
});
