import { and, eq } from 'drizzle-orm';
import { person } from '@/db/schema';
import { Problem } from '@/lib/errors';
import { changePasswordInput } from '@/lib/schemas/people';
import { withPeople } from '../transaction';
import { openPersonVerb } from '../verb';
import { findPerson } from './findPerson';
import { forgiveTries, spendTry } from './limiter';
import { mailPasswordChanged } from './mails';
import { fitsPassword, hashPassword } from './passwordHash';
import { assertGoodPassword } from './passwordRules';
import { closeAllSessions, closeSession, isSharedComputer, openSession } from './session';

const changedElsewhere = () =>
  new Problem('conflict', 'The password was changed somewhere else a moment ago. Sign in with that one.');

/** Asks for the current password, mails the owner, and gives this browser a new session in place of its old one. */
export const changePassword = openPersonVerb({
  input: changePasswordInput,
  run: async ({ ctx, person: me, sessionId, input }) => {
    assertGoodPassword(input.password, me.email);
    await spendTry(me.email);
    const row = await withPeople((tx) => findPerson(tx, me.email));
    if (!row || !(await fitsPassword(row.passwordHash, input.currentPassword))) {
      throw new Problem('invalid', 'Nothing was changed.', {
        fields: { currentPassword: 'This is not your current password.' },
      });
    }
    await forgiveTries(me.email);
    const passwordHash = await hashPassword(input.password);
    const sharedComputer = await withPeople(async (tx) => {
      const changed = await tx
        .update(person)
        .set({ passwordHash })
        .where(and(eq(person.id, row.id), eq(person.passwordHash, row.passwordHash)))
        .returning({ id: person.id });
      if (changed.length === 0) {
        throw changedElsewhere();
      }
      if (input.endOtherSessions) await closeAllSessions(tx, row.id, sessionId);
      await mailPasswordChanged(tx, ctx, row, input.endOtherSessions ? 'others' : 'none');
      return isSharedComputer(tx, sessionId);
    });
    await closeSession(ctx, sessionId);
    const opened = await openSession(
      ctx,
      { personId: row.id, passwordHash },
      { sharedComputer, userAgent: input.userAgent },
    );
    if (!opened) throw changedElsewhere();
    return opened;
  },
});
