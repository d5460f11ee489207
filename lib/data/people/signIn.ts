import { and, eq } from 'drizzle-orm';
import { person } from '@/db/schema';
import { Problem } from '@/lib/errors';
import { log } from '@/lib/log';
import { signInInput } from '@/lib/schemas/people';
import { withPeople } from '../transaction';
import { publicVerb } from '../verb';
import { findPerson, type PersonRow } from './findPerson';
import { forgiveTries, spendPlace, spendTry } from './limiter';
import { fitsPassword, hashPassword, isOutdatedHash } from './passwordHash';
import { closeSession, openSession } from './session';

/** One sentence for an unknown address, a wrong password and an unconfirmed address: none may be told from another. */
const refused = () =>
  new Problem(
    'not-signed-in',
    'This address and password do not open an account here. If you signed up lately, first open the link in the mail we sent; if the password is lost, ask for a new one.',
    { reason: 'sign-in-refused' },
  );

/** Only over the hash it was compared to: a password that was changed meanwhile stays changed. */
async function hashAnew(row: PersonRow, password: string): Promise<string> {
  const passwordHash = await hashPassword(password);
  const now = await withPeople(async (tx) => {
    const written = await tx
      .update(person)
      .set({ passwordHash })
      .where(and(eq(person.id, row.id), eq(person.passwordHash, row.passwordHash)))
      .returning({ passwordHash: person.passwordHash });
    return written[0] ?? findPerson(tx, row.email);
  });
  if (!now || !(now.passwordHash === passwordHash || (await fitsPassword(now.passwordHash, password)))) throw refused();
  return now.passwordHash;
}

export const signIn = publicVerb({
  input: signInInput,
  run: async ({ ctx, input }) => {
    await spendPlace(ctx);
    await spendTry(input.email);
    const row = await withPeople((tx) => findPerson(tx, input.email));
    const fits = await fitsPassword(row?.passwordHash, input.password);
    if (!row || !fits || !row.emailVerifiedAt || row.disabledAt) {
      log().info({ event: 'sign-in-refused', requestId: ctx.requestId, personId: row?.id }, 'sign-in refused');
      throw refused();
    }
    await forgiveTries(input.email);
    const passwordHash = isOutdatedHash(row.passwordHash) ? await hashAnew(row, input.password) : row.passwordHash;
    // The cookie this browser came with dies, whosever it was: a token fixed beforehand is worth nothing.
    if (ctx.actor.kind === 'person') await closeSession(ctx, ctx.actor.sessionId);
    const { sharedComputer, userAgent } = input;
    const opened = await openSession(ctx, { personId: row.id, passwordHash }, { sharedComputer, userAgent });
    if (!opened) throw refused();
    log().info({ event: 'signed-in', requestId: ctx.requestId, personId: row.id }, 'signed in');
    return { id: row.id, ...opened };
  },
});
