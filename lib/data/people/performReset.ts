import { and, eq, isNull, sql } from 'drizzle-orm';
import { person } from '@/db/schema';
import { performResetInput } from '@/lib/schemas/people';
import { withPeople } from '../transaction';
import { publicVerb } from '../verb';
import { forgiveTries } from './limiter';
import { mailPasswordChanged } from './mails';
import { hashPassword } from './passwordHash';
import { assertGoodPassword } from './passwordRules';
import { closeAllSessions } from './session';
import { dropTokens, goneLink, lookAtToken, takeToken } from './tokens';

/** Ends every session and signs nobody in: whoever holds the mailbox types the new password once more. */
export const performReset = publicVerb({
  input: performResetInput,
  run: async ({ ctx, input }) => {
    const link = await withPeople((tx) => lookAtToken(tx, ctx, 'reset-password', input.token));
    assertGoodPassword(input.password, link.email);
    const passwordHash = await hashPassword(input.password);
    await withPeople(async (tx) => {
      const taken = await takeToken(tx, ctx, 'reset-password', input.token);
      const [row] = await tx
        .update(person)
        // The link came by mail, so it proves the address as well.
        .set({ passwordHash, emailVerifiedAt: sql`coalesce(${person.emailVerifiedAt}, ${ctx.now.toISOString()})` })
        .where(
          and(
            eq(person.id, taken.personId),
            sql`lower(${person.email}) = ${taken.email.toLowerCase()}`,
            isNull(person.disabledAt),
          ),
        )
        .returning();
      if (!row) throw goneLink();
      await dropTokens(tx, ctx, row.id, 'reset-password');
      await dropTokens(tx, ctx, row.id, 'verify-address');
      await closeAllSessions(tx, row.id);
      await mailPasswordChanged(tx, ctx, row, 'all');
    });
    await forgiveTries(link.email);
    return { email: link.email };
  },
});
