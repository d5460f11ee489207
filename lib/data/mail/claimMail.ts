import { and, eq, inArray, sql } from 'drizzle-orm';
import { z } from 'zod';
import { outbox } from '@/db/schema';
import { withPeople } from '../transaction';
import { workerVerb } from '../verb';

const DAY_MS = 24 * 3600 * 1000;

/**
 * Takes a message for sending. A message already being sent is taken again: its worker may be dead, and the provider
 * keeps one mail per key. The provider forgets keys after a day, so an unclear message of that age is left to a person.
 */
export const claimMail = workerVerb({
  input: z.strictObject({ id: z.uuid() }),
  run: ({ ctx, input }) =>
    withPeople(async (tx) => {
      const claimable = and(eq(outbox.id, input.id), inArray(outbox.state, ['queued', 'sending']));
      await tx
        .update(outbox)
        .set({ state: 'unknown', lastError: 'No clear answer from the mail service within a day.' })
        .where(and(claimable, sql`${outbox.firstTriedAt} < ${new Date(ctx.now.getTime() - DAY_MS).toISOString()}`));
      const rows = await tx
        .update(outbox)
        .set({
          state: 'sending',
          attempts: sql`${outbox.attempts} + 1`,
          firstTriedAt: sql`coalesce(${outbox.firstTriedAt}, ${ctx.now.toISOString()})`,
        })
        .where(claimable)
        .returning();
      return rows[0] ?? null;
    }),
});
