import { and, eq, inArray } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { outbox, outboxItem } from '@/db/schema';

/** "reminder day" for every notice of these reminders that a message to this person already carries, whether it has left or not. */
export async function noticesSent(
  tx: Transaction,
  personId: string,
  reminderIds: readonly string[],
): Promise<Set<string>> {
  const rows = await tx
    .select({ reminderId: outboxItem.reminderId, dueOn: outboxItem.dueOn })
    .from(outboxItem)
    .innerJoin(outbox, eq(outbox.id, outboxItem.outboxId))
    .where(and(eq(outbox.personId, personId), inArray(outboxItem.reminderId, [...reminderIds])));
  return new Set(rows.map((row) => `${row.reminderId} ${row.dueOn}`));
}
