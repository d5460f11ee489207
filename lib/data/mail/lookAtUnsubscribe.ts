import { and, eq } from 'drizzle-orm';
import { mailPreference } from '@/db/schema';
import { mailTokenInput } from '@/lib/schemas/reminders';
import { withPeople } from '../transaction';
import { publicVerb } from '../verb';
import { readLinkToken } from './linkToken';

/** What the page behind the link shows. Looking changes nothing: mail scanners look too. */
export const lookAtUnsubscribe = publicVerb({
  input: mailTokenInput,
  run: ({ ctx, input }) =>
    withPeople(async (tx) => {
      const link = await readLinkToken(tx, ctx, input.token, 'unsubscribe');
      const [row] = await tx
        .select({ wanted: mailPreference.wanted })
        .from(mailPreference)
        .where(
          and(eq(mailPreference.personId, link.personId), eq(mailPreference.kind, link.payload.kind ?? 'reminder')),
        );
      return { name: link.name, stopped: row?.wanted === false };
    }),
});
