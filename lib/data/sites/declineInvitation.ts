import { and, eq } from 'drizzle-orm';
import { invitation } from '@/db/schema';
import { linkInput } from '@/lib/schemas/people';
import { audit } from '../audit';
import { hashSecret } from '../people/secrets';
import { withPeople } from '../transaction';
import { publicVerb } from '../verb';
import { openInvitation } from './openInvitation';

/** The mailed link is enough to say no; no account is needed for that. */
export const declineInvitation = publicVerb({
  input: linkInput,
  run: ({ ctx, input }) =>
    withPeople(async (tx) => {
      const { siteId, row, answeredMeanwhile } = await openInvitation(tx, ctx, hashSecret(input.token));
      const declined = await tx
        .update(invitation)
        .set({ state: 'declined', answeredAt: ctx.now })
        .where(and(eq(invitation.siteId, siteId), eq(invitation.id, row.id), eq(invitation.state, 'open')))
        .returning({ id: invitation.id });
      if (declined.length === 0) throw answeredMeanwhile();
      await audit(tx, ctx, siteId, { act: 'invitation.declined', objectKind: 'invitation', objectId: row.id });
      return { ok: true as const };
    }),
});
