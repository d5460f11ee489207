import { and, inArray, lt, sql } from 'drizzle-orm';
import { z } from 'zod';
import { outbox } from '@/db/schema';
import { enqueue, withPeople } from '../transaction';
import { workerVerb } from '../verb';

const WAIT_MS = 5 * 60 * 1000;

/** Messages whose job was lost or gave up while the mail service was down get a new job; sending twice is closed by the key. */
export const requeueMail = workerVerb({
  input: z.strictObject({}),
  run: ({ ctx }) =>
    withPeople(async (tx) => {
      const before = new Date(ctx.now.getTime() - WAIT_MS);
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
      for (const row of rows) await enqueue(tx, 'send-mail', { id: row.id }, { singletonKey: row.id });
      return rows.length;
    }),
});
