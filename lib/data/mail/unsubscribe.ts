import { mailPreference } from '@/db/schema';
import { mailTokenInput } from '@/lib/schemas/reminders';
import { withPeople } from '../transaction';
import { publicVerb } from '../verb';
import { readLinkToken } from './linkToken';

/** Ends one kind of mail for the person the link was written to. Asking twice is the same as asking once. */
export const unsubscribe = publicVerb({
  input: mailTokenInput,
  run: ({ ctx, input }) =>
    withPeople(async (tx) => {
      const link = await readLinkToken(tx, ctx, input.token, 'unsubscribe');
      const kind = link.payload.kind ?? 'reminder';
      await tx
        .insert(mailPreference)
        .values({ personId: link.personId, kind, wanted: false, changedAt: ctx.now })
        .onConflictDoUpdate({
          target: [mailPreference.personId, mailPreference.kind],
          set: { wanted: false, changedAt: ctx.now },
        });
      return { done: true as const };
    }),
});
