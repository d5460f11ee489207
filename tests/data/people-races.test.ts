import { eq } from 'drizzle-orm';
import { describe, expect, it } from 'vitest';
import { person, session } from '@/db/schema';
import { makeContext } from '@/lib/data/context';
import { database } from '@/lib/data/database';
import { changePassword } from '@/lib/data/people/changePassword';
import { hashPassword } from '@/lib/data/people/passwordHash';
import { actorOfCookie } from '@/lib/data/people/session';
import { signIn } from '@/lib/data/people/signIn';
import { ctxNobody, useWorld } from '../support/factory';
import { holding, untilWaiting } from '../support/held';
import { GOOD_PASSWORD, problemOf, signUpConfirmed } from '../support/people';

const world = useWorld();
const secretIn = (setCookie: string) => /__Host-loamline=([^;]+)/.exec(setCookie)?.[1];
const hashOf = async (id: string) => (await database().select().from(person).where(eq(person.id, id)))[0]?.passwordHash;

describe('a new password by mail', () => {
  it('[E 68] leaves no session to somebody who was signing in with the old one just then', async () => {
    const who = await signUpConfirmed();
    const fresh = await hashPassword('another row of leeks');
    const held = await holding(async (tx) => {
      await tx.update(person).set({ passwordHash: fresh }).where(eq(person.id, who.id));
      await tx.delete(session).where(eq(session.userId, who.id));
    });
    const entering = problemOf(
      signIn({ ctx: await ctxNobody(), input: { email: who.email, password: GOOD_PASSWORD } }),
    );
    await untilWaiting(world, 1, entering);
    await held.release();
    expect(await entering).toMatchObject({ code: 'not-signed-in', reason: 'sign-in-refused' });
    expect(await database().select().from(session).where(eq(session.userId, who.id))).toEqual([]);
  });

  it('[E 2] is not put back by a sign-in that hashes the old one anew', async () => {
    const { hash } = await import('@node-rs/argon2');
    const who = await signUpConfirmed();
    const cheap = await hash(GOOD_PASSWORD, { memoryCost: 8192, timeCost: 1, parallelism: 1 });
    await database().update(person).set({ passwordHash: cheap }).where(eq(person.id, who.id));
    const fresh = await hashPassword('another row of leeks');
    const held = await holding((tx) => tx.update(person).set({ passwordHash: fresh }).where(eq(person.id, who.id)));
    const entering = problemOf(
      signIn({ ctx: await ctxNobody(), input: { email: who.email, password: GOOD_PASSWORD } }),
    );
    await untilWaiting(world, 1, entering);
    await held.release();
    expect(await entering).toMatchObject({ code: 'not-signed-in' });
    expect(await hashOf(who.id)).toBe(fresh);
  });
});

describe('two sign-ins at once', () => {
  it('[E 2] both open, though only one of them hashes the password anew', async () => {
    const { hash } = await import('@node-rs/argon2');
    const who = await signUpConfirmed();
    const cheap = await hash(GOOD_PASSWORD, { memoryCost: 8192, timeCost: 1, parallelism: 1 });
    await database().update(person).set({ passwordHash: cheap }).where(eq(person.id, who.id));
    const enter = async () => signIn({ ctx: await ctxNobody(), input: { email: who.email, password: GOOD_PASSWORD } });
    const opened = await Promise.all([enter(), enter(), enter()]);
    expect(opened.map((one) => one.id)).toEqual([who.id, who.id, who.id]);
  });
});

describe('a new password on a shared computer', () => {
  it('[E 16] does not make the session there a long one', async () => {
    const who = await signUpConfirmed();
    const { setCookie } = await signIn({
      ctx: await ctxNobody(),
      input: { email: who.email, password: GOOD_PASSWORD, sharedComputer: true },
    });
    const ctx = await makeContext(await actorOfCookie(secretIn(setCookie)));
    const opened = await changePassword({
      ctx,
      input: { currentPassword: GOOD_PASSWORD, password: 'another row of leeks' },
    });
    expect(opened.setCookie).not.toMatch(/max-age/i);
    const [row] = await database().select().from(session).where(eq(session.userId, who.id));
    expect(row?.sharedComputer).toBe(true);
  });
});
