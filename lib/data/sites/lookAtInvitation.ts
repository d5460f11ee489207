import { eq } from 'drizzle-orm';
import { site } from '@/db/schema';
import { notFound } from '@/lib/errors';
import { linkInput } from '@/lib/schemas/people';
import type { InvitationLook } from '@/lib/schemas/sites';
import { findPerson } from '../people/findPerson';
import { namesOf } from '../people/names';
import { withPeople } from '../transaction';
import { publicVerb } from '../verb';
import { openInvitation } from './openInvitation';

/** For whoever holds the link. Looking changes nothing. */
export const lookAtInvitation = publicVerb({
  input: linkInput,
  run: ({ ctx, input }) =>
    withPeople(async (tx): Promise<InvitationLook> => {
      const { siteId, row } = await openInvitation(tx, ctx, input.token);
      const [here] = await tx.select({ name: site.name }).from(site).where(eq(site.id, siteId));
      if (!here) throw notFound();
      const names = await namesOf(tx, [row.invitedBy]);
      const account = await findPerson(tx, row.email);
      const me = ctx.actor.kind === 'person' ? ctx.actor.person : null;
      const mine = me?.email.toLowerCase() === row.email.toLowerCase();
      return {
        siteName: here.name,
        role: row.role,
        invitedBy: names.get(row.invitedBy) ?? 'Somebody on the site',
        email: row.email,
        expiresAt: row.expiresAt.toISOString(),
        next: me ? (mine ? 'accept' : 'other-account') : account?.emailVerifiedAt ? 'sign-in' : 'sign-up',
      };
    }),
});
