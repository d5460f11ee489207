import { and, desc, eq } from 'drizzle-orm';
import { token } from '@/db/schema';
import { addressInput } from '@/lib/schemas/people';
import { withPeople } from '../transaction';
import { publicVerb } from '../verb';
import { findPerson } from './findPerson';
import { spendMail, spendPlace } from './limiter';
import { mailVerification } from './mails';

/** Another link for an address that waits to be confirmed. The answer is the same for every address. */
export const resendVerification = publicVerb({
  input: addressInput,
  run: async ({ ctx, input }) => {
    await spendPlace(ctx);
    await spendMail(input.email);
    await withPeople(async (tx) => {
      const row = await findPerson(tx, input.email);
      if (!row || row.emailVerifiedAt || row.disabledAt) return;
      const [latest] = await tx
        .select({ payload: token.payload })
        .from(token)
        .where(and(eq(token.personId, row.id), eq(token.purpose, 'verify-address')))
        .orderBy(desc(token.createdAt))
        .limit(1);
      if (latest) await mailVerification(tx, ctx, { ...row, name: latest.payload.name ?? row.name }, latest.payload);
    });
    return { email: input.email };
  },
});
