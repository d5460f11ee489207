import { and, asc, eq, isNull, type SQL } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { plot, reminder, reminderRule, reminderSnooze, site } from '@/db/schema';
import type { PersonId, SiteId } from '@/lib/domain/ids';

/** Reminders with their plot and site, and this person's snooze. */
export function loadDue(tx: Transaction, siteId: SiteId, personId: PersonId, only?: SQL) {
  return tx
    .select({
      id: reminder.id,
      plotId: plot.id,
      plotName: plot.name,
      siteName: site.name,
      kind: reminderRule.kind,
      dueOn: reminder.dueOn,
      reason: reminder.reason,
      state: reminder.state,
      snoozedUntil: reminderSnooze.until,
    })
    .from(reminder)
    .innerJoin(reminderRule, and(eq(reminderRule.siteId, siteId), eq(reminderRule.id, reminder.ruleId)))
    .innerJoin(plot, and(eq(plot.siteId, siteId), eq(plot.id, reminder.plotId), isNull(plot.archivedAt)))
    .innerJoin(site, eq(site.id, siteId))
    .leftJoin(
      reminderSnooze,
      and(
        eq(reminderSnooze.siteId, siteId),
        eq(reminderSnooze.reminderId, reminder.id),
        eq(reminderSnooze.personId, personId),
      ),
    )
    .where(and(eq(reminder.siteId, siteId), only))
    .orderBy(asc(reminder.dueOn), asc(plot.name));
}
