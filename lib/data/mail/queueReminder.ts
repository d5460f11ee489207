import { z } from 'zod';
import { outbox, outboxItem, token } from '@/db/schema';
import { daySchema, idSchema } from '@/lib/schemas/parts';
import { hashSecret } from '../people/secrets';
import { enqueue, withPeople } from '../transaction';
import { workerVerb } from '../verb';

const YEAR_MS = 366 * 24 * 3600 * 1000;

const input = z.strictObject({
  personId: idSchema,
  to: z.string(),
  day: daySchema,
  subject: z.string(),
  html: z.string(),
  text: z.string(),
  headers: z.record(z.string(), z.string()),
  attachments: z.array(z.strictObject({ filename: z.string(), content: z.string(), contentType: z.string() })),
  items: z.array(z.strictObject({ reminderId: idSchema, noticeOn: daySchema })),
  unsubscribeSecret: z.string().min(40),
  actionSecret: z.string().min(40),
});

/**
 * One reminder letter a person and day: the unique key lets one of any number of sweeping workers through, and the
 * message, the links in it and the job that sends it are written together or not at all.
 */
export const queueReminder = workerVerb({
  input,
  run: ({ ctx, input: letter }) =>
    withPeople(async (tx) => {
      const [row] = await tx
        .insert(outbox)
        .values({
          personId: letter.personId,
          toAddress: letter.to,
          kind: 'reminder',
          dedupeKey: `${letter.personId} ${letter.day}`,
          subject: letter.subject,
          html: letter.html,
          text: letter.text,
          headers: letter.headers,
          attachments: letter.attachments,
          createdAt: ctx.now,
        })
        .onConflictDoNothing()
        .returning({ id: outbox.id });
      if (!row) return { queued: false };
      await tx
        .insert(outboxItem)
        .values(letter.items.map((item) => ({ outboxId: row.id, reminderId: item.reminderId, dueOn: item.noticeOn })));
      const links = {
        personId: letter.personId,
        email: letter.to,
        expiresAt: new Date(ctx.now.getTime() + YEAR_MS),
        createdAt: ctx.now,
      };
      await tx.insert(token).values([
        { ...links, id: hashSecret(letter.unsubscribeSecret), purpose: 'unsubscribe', payload: { kind: 'reminder' } },
        { ...links, id: hashSecret(letter.actionSecret), purpose: 'mail-action', payload: { outboxId: row.id } },
      ]);
      await enqueue(tx, 'send-mail', { id: row.id });
      return { queued: true };
    }),
});
