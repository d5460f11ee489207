import { and, inArray, lt, sql } from 'drizzle-orm';
import { z } from 'zod';
import { outbox } from '@/db/schema';
import { enqueue, withPeople } from '../transaction';
import { workerVerb } from '../verb';

const WAIT_SECONDS = 5 * 60;

/**
 * Messages whose job was lost or gave up while the mail service was down get a new job; sending twice is closed by the
 * key. However often this runs, a message gets one new job in five minutes: a long outage must not pile them up.
 */
export const requeueMail = workerVerb({
  input: z.strictObject({}),
  run: ({ ctx }) =>
    withPeople(async (tx) => {
      const before = new Date(ctx.now.getTime() - WAIT_SECONDS * 1000);
      const rows = await tx
        .select({ id: outbox.id })
        .from(outbox)
        .where(
          and(
            inArray(outbox.state, ['queued', 'sending']),
            lt(sql`coalesce(${outbox.firstTriedAt}, ${outbox.createdAt})`, before.toISOString()),
          ),
        )
        .orderBy(outbox.createdAt)
        .limit(200);
      const once = { singletonSeconds: WAIT_SECONDS };
      for (const row of rows) await enqueue(tx, 'send-mail', { id: row.id }, { ...once, singletonKey: row.id });
      return rows.length;
    }),
});
