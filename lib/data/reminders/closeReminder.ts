import { and, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { reminder } from '@/db/schema';
import type { PersonId, SiteId } from '@/lib/domain/ids';
import { notFound, Problem } from '@/lib/errors';
import { closeReminderInput } from '@/lib/schemas/reminders';
import { audit } from '../audit';
import type { Ctx } from '../context';
import { siteVerb } from '../verb';

export async function closeInSite(
  tx: Transaction,
  ctx: Ctx,
  siteId: SiteId,
  personId: PersonId,
  reminderId: string,
): Promise<void> {
  const here = and(eq(reminder.siteId, siteId), eq(reminder.id, reminderId));
  const closed = await tx
    .update(reminder)
    .set({ state: 'done', closedBy: personId, closedAt: ctx.now })
    .where(and(here, eq(reminder.state, 'open')))
    .returning({ id: reminder.id });
  if (closed.length === 0) {
    const known = await tx.select({ id: reminder.id }).from(reminder).where(here);
    if (known.length === 0) throw notFound();
    throw new Problem('conflict', 'This reminder is already closed; nothing more is sent for it.');
  }
  // From a letter nobody is signed in: who it was written to stands in the detail.
  const detail = { personId };
  await audit(tx, ctx, siteId, { act: 'reminder.done', objectKind: 'reminder', objectId: reminderId, detail });
}

/** "Already sampled": closed for everybody on the site. */
export const closeReminder = siteVerb({
  act: 'reminder.already-sampled',
  input: closeReminderInput,
  run: async ({ ctx, tx, siteId, person, input }) => {
    await closeInSite(tx, ctx, siteId, person.id, input.reminderId);
    return { done: true as const };
  },
});
