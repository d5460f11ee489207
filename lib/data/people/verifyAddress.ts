import { and, eq, isNull, sql } from 'drizzle-orm';
import { person } from '@/db/schema';
import { linkInput } from '@/lib/schemas/people';
import { joinByInvitation } from '../sites/joinByInvitation';
import { withPeople } from '../transaction';
import { publicVerb } from '../verb';
import { dropTokens, goneLink, takeToken } from './tokens';

/** Confirms the address with the name and password of this link's own sign-up, and accepts the invitation it carried. */
export const verifyAddress = publicVerb({
  input: linkInput,
  run: ({ ctx, input }) =>
    withPeople(async (tx) => {
      const link = await takeToken(tx, ctx, 'verify-address', input.token);
      const { name, passwordHash, invitation } = link.payload;
      const [row] = await tx
        .update(person)
        .set({ emailVerifiedAt: ctx.now, ...(name ? { name } : {}), ...(passwordHash ? { passwordHash } : {}) })
        .where(
          and(
            eq(person.id, link.personId),
            sql`lower(${person.email}) = ${link.email.toLowerCase()}`,
            isNull(person.emailVerifiedAt),
            isNull(person.disabledAt),
          ),
        )
        .returning();
      if (!row) throw goneLink();
      await dropTokens(tx, ctx, row.id, 'verify-address');
      if (!invitation) return { email: row.email, invitation: 'none' as const, siteId: null };
      const siteId = await joinByInvitation(tx, ctx, invitation, row);
      return { email: row.email, invitation: siteId ? ('accepted' as const) : ('gone' as const), siteId };
    }),
});
