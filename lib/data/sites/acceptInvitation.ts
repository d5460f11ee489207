import { Problem } from '@/lib/errors';
import { linkInput } from '@/lib/schemas/people';
import { hashSecret } from '../people/secrets';
import { personVerb } from '../verb';
import { joinByInvitation } from './joinByInvitation';
import { openInvitation } from './openInvitation';

/** Bound to the invited address: holding the link is not enough, and another account is told which one to use. */
export const acceptInvitation = personVerb({
  input: linkInput,
  run: async ({ ctx, tx, person, input }) => {
    const tokenHash = hashSecret(input.token);
    const { row, answeredMeanwhile } = await openInvitation(tx, ctx, tokenHash);
    if (row.email.toLowerCase() !== person.email.toLowerCase()) {
      throw new Problem(
        'conflict',
        `This invitation is for ${row.email}, and you are signed in as ${person.email}. Sign out and use that account, or ask for an invitation to this address.`,
        { reason: 'other-account' },
      );
    }
    const siteId = await joinByInvitation(tx, ctx, tokenHash, person);
    if (!siteId) throw answeredMeanwhile();
    return { siteId };
  },
});
