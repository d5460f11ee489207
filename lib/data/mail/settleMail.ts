import { and, eq } from 'drizzle-orm';
import { z } from 'zod';
import { outbox } from '@/db/schema';
import { withPeople } from '../transaction';
import { workerVerb } from '../verb';

/** Writes down what the provider said. */
export const settleMail = workerVerb({
  input: z.discriminatedUnion('answer', [
    z.strictObject({ answer: z.literal('sent'), id: z.uuid(), providerId: z.string() }),
    z.strictObject({ answer: z.literal('later'), id: z.uuid(), sentence: z.string() }),
    z.strictObject({ answer: z.literal('refused'), id: z.uuid(), sentence: z.string() }),
  ]),
  run: ({ ctx, input }) =>
    withPeople(async (tx) => {
      const change =
        input.answer === 'sent'
          ? { state: 'sent' as const, sentAt: ctx.now, providerId: input.providerId, lastError: null }
          : {
              state: input.answer === 'refused' ? ('failed' as const) : ('queued' as const),
              lastError: input.sentence,
            };
      await tx
        .update(outbox)
        .set(change)
        .where(and(eq(outbox.id, input.id), eq(outbox.state, 'sending')));
    }),
});
