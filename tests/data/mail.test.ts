import { eq } from 'drizzle-orm';
import { describe, expect, it } from 'vitest';
import { outbox, person, token } from '@/db/schema';
import { database } from '@/lib/data/database';
import { claimMail } from '@/lib/data/mail/claimMail';
import { settleMail } from '@/lib/data/mail/settleMail';
import { requestReset } from '@/lib/data/people/requestReset';
import { signUp } from '@/lib/data/people/signUp';
import { ctxNobody, ctxWorker, useWorld } from '../support/factory';
import { GOOD_PASSWORD, linkIn, mailsTo, newAddress, signUpConfirmed } from '../support/people';

useWorld();

async function leave(email: string, kind: string, answer: 'sent' | 'later' | 'refused') {
  const [mail] = await mailsTo(email, kind);
  if (!mail) throw new Error(`No ${kind} mail waits.`);
  const ctx = await ctxWorker();
  await claimMail({ ctx, input: { id: mail.id } });
  const told = answer === 'sent' ? { answer, providerId: 'p-1' } : { answer, sentence: 'said so' };
  await settleMail({ ctx, input: { id: mail.id, ...told } });
  const [row] = await database().select().from(outbox).where(eq(outbox.id, mail.id));
  return row;
}

describe('[E 64] a link that was used', () => {
  it('keeps nothing of what was typed at the sign-up', async () => {
    const who = await signUpConfirmed();
    const rows = await database().select().from(token).where(eq(token.personId, who.id));
    expect(rows.map((row) => [row.purpose, row.usedAt !== null, row.payload])).toEqual([['verify-address', true, {}]]);
  });
});

describe('[E 64] the secret of a mailed link', () => {
  it.each(['sent', 'refused'] as const)('is no longer in the database once the mail is %s', async (answer) => {
    const email = newAddress();
    await signUp({ ctx: await ctxNobody(), input: { name: 'Row Keeper', email, password: GOOD_PASSWORD } });
    const secret = await linkIn(email, 'verify-address');
    const row = await leave(email, 'verify-address', answer);
    expect(row).toMatchObject({ subject: expect.stringMatching(/./), html: '', text: '' });
    expect(JSON.stringify(await database().select().from(outbox))).not.toContain(secret);
  });

  it('waits with the mail while the mail service is away', async () => {
    const who = await signUpConfirmed();
    await requestReset({ ctx: await ctxNobody(), input: { email: who.email } });
    const secret = await linkIn(who.email, 'reset-password');
    expect((await leave(who.email, 'reset-password', 'later'))?.text).toContain(secret);
    expect((await leave(who.email, 'reset-password', 'sent'))?.text).toBe('');
    expect(await database().select({ id: person.id }).from(person).where(eq(person.id, who.id))).toHaveLength(1);
  });
});
