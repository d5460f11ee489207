import { and, eq } from 'drizzle-orm';
import { z } from 'zod';
import { outbox } from '@/db/schema';
import { withPeople } from '../transaction';
import { workerVerb } from '../verb';

/** Links in letters open something: once one has left, or never will, only its subject is kept. */
const WITHOUT_BODY = { html: '', text: '', headers: {} };

/** Writes down what the provider said. */
export const settleMail = workerVerb({
  input: z.discriminatedUnion('answer', [
    z.strictObject({ answer: z.literal('sent'), id: z.uuid(), providerId: z.string() }),
    z.strictObject({ answer: z.literal('later'), id: z.uuid(), sentence: z.string() }),
    z.strictObject({ answer: z.literal('refused'), id: z.uuid(), sentence: z.string() }),
  ]),
  run: ({ ctx, input }) =>
    withPeople(async (tx) => {
      const change = {
        sent: () => ({ state: 'sent' as const, sentAt: ctx.now, ...WITHOUT_BODY }),
        later: () => ({ state: 'queued' as const }),
        refused: () => ({ state: 'failed' as const, ...WITHOUT_BODY }),
      }[input.answer]();
      const said =
        input.answer === 'sent' ? { providerId: input.providerId, lastError: null } : { lastError: input.sentence };
      await tx
        .update(outbox)
        .set({ ...change, ...said })
        .where(and(eq(outbox.id, input.id), eq(outbox.state, 'sending')));
    }),
});
