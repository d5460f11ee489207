import { and, eq, isNull, notExists, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { person, token } from '@/db/schema';
import { signUpInput } from '@/lib/schemas/people';
import type { Ctx } from '../context';
import { withPeople } from '../transaction';
import { publicVerb } from '../verb';
import { findPerson } from './findPerson';
import { spendMail, spendPlace } from './limiter';
import { mailAddressTaken, mailVerification } from './mails';
import { hashPassword } from './passwordHash';
import { assertGoodPassword } from './passwordRules';
import { hashSecret, newSecret } from './secrets';

/** Takes back a sign-up whose address was mistyped: its link stops working, and an account nobody confirmed goes. */
async function takeBack(tx: Transaction, ctx: Ctx, ticket: string): Promise<void> {
  const rows = await tx
    .update(token)
    .set({ usedAt: ctx.now })
    .where(
      and(
        eq(token.purpose, 'verify-address'),
        isNull(token.usedAt),
        sql`${token.payload} ->> 'ticket' = ${hashSecret(ticket)}`,
      ),
    )
    .returning({ personId: token.personId });
  for (const { personId } of rows) {
    const otherLinks = tx
      .select({ id: token.id })
      .from(token)
      .where(and(eq(token.personId, personId), isNull(token.usedAt)));
    await tx.delete(person).where(and(eq(person.id, personId), isNull(person.emailVerifiedAt), notExists(otherLinks)));
  }
}

/**
 * Answers the same for a new address and a known one; only the mailbox learns the difference. Name and password travel
 * with the link, so a link confirms what was typed at its own sign-up and not what somebody else typed for that address.
 */
export const signUp = publicVerb({
  input: signUpInput,
  run: async ({ ctx, input }) => {
    assertGoodPassword(input.password, input.email);
    await spendPlace(ctx);
    await spendMail(input.email);
    const passwordHash = await hashPassword(input.password);
    const ticket = newSecret(ctx);
    await withPeople(async (tx) => {
      if (input.replaces) await takeBack(tx, ctx, input.replaces);
      const known = (await findPerson(tx, input.email)) ?? (await open(tx, ctx, input, passwordHash));
      if (known.emailVerifiedAt || known.disabledAt) return mailAddressTaken(tx, ctx, known);
      const payload = { name: input.name, passwordHash, ticket: hashSecret(ticket) };
      const invitation = input.invitation ? { invitation: hashSecret(input.invitation) } : {};
      return mailVerification(tx, ctx, { ...known, name: input.name }, { ...payload, ...invitation });
    });
    return { email: input.email, ticket };
  },
});

type Filled = { name: string; email: string; timeZone?: string | undefined; units?: 'us' | 'metric' | undefined };

async function open(tx: Transaction, ctx: Ctx, input: Filled, passwordHash: string) {
  await tx
    .insert(person)
    .values({
      name: input.name,
      email: input.email,
      passwordHash,
      createdAt: ctx.now,
      ...(input.timeZone ? { timeZone: input.timeZone } : {}),
      ...(input.units === 'metric' ? { units: 'metric', paper: 'a4', locale: 'en-GB' } : {}),
    })
    .onConflictDoNothing();
  const row = await findPerson(tx, input.email);
  if (!row) throw new Error('An account was written and is not there.');
  return row;
}
