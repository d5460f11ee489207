import { eq } from 'drizzle-orm';
import { describe, expect, it } from 'vitest';
import { person, session, signInAttempt, token } from '@/db/schema';
import { database } from '@/lib/data/database';
import { lookAtVerification } from '@/lib/data/people/lookAtVerification';
import { fitsPassword, hashingNow, hashPassword } from '@/lib/data/people/passwordHash';
import { passwordObjection } from '@/lib/data/people/passwordRules';
import { performReset } from '@/lib/data/people/performReset';
import { requestReset } from '@/lib/data/people/requestReset';
import { resendVerification } from '@/lib/data/people/resendVerification';
import { signIn } from '@/lib/data/people/signIn';
import { signUp } from '@/lib/data/people/signUp';
import { verifyAddress } from '@/lib/data/people/verifyAddress';
import { ctxNobody, useWorld } from '../support/factory';
import { GOOD_PASSWORD, linkIn, mailsTo, newAddress, problemOf, signUpConfirmed } from '../support/people';

const world = useWorld();
const HOUR = 3600;

const attempt = async (email: string, password: string) =>
  signIn({ ctx: await ctxNobody(), input: { email, password } });
const rowOf = async (email: string) => (await database().select().from(person).where(eq(person.email, email)))[0];
const signUpAs = async (email: string, over: { password?: string; name?: string; replaces?: string } = {}) =>
  signUp({ ctx: await ctxNobody(), input: { name: 'Row Keeper', email, password: GOOD_PASSWORD, ...over } });

describe('passwords', () => {
  it('[E 1] are kept as argon2id with 19456 KiB, two passes, one lane, and a salt of their own', async () => {
    const [one, two] = await Promise.all([hashPassword(GOOD_PASSWORD), hashPassword(GOOD_PASSWORD)]);
    expect(one).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
    expect(one).not.toBe(two);
    expect(await fitsPassword(one, GOOD_PASSWORD)).toBe(true);
    expect(await fitsPassword(one, `${GOOD_PASSWORD} `)).toBe(false);
  });

  it('[E 2] are hashed again at a sign-in when the stored cost is an older one', async () => {
    const { hash } = await import('@node-rs/argon2');
    const who = await signUpConfirmed();
    const cheap = await hash(GOOD_PASSWORD, { memoryCost: 8192, timeCost: 1, parallelism: 1 });
    await database().update(person).set({ passwordHash: cheap }).where(eq(person.id, who.id));
    await attempt(who.email, GOOD_PASSWORD);
    expect((await rowOf(who.email))?.passwordHash).toMatch(/m=19456,t=2,p=1/);
  });

  it('[E 3] are hashed at most four at a time', async () => {
    let most = 0;
    const watch = setInterval(() => {
      most = Math.max(most, hashingNow().running);
    }, 1);
    await Promise.all(Array.from({ length: 24 }, () => hashPassword(GOOD_PASSWORD)));
    clearInterval(watch);
    expect(most).toBe(4);
    expect(hashingNow()).toEqual({ running: 0, waiting: 0 });
  });

  it('[E 4] may be 8 to 128 characters of any kind, and nothing of them is cut off', async () => {
    const emoji = `${'🌱'.repeat(63)}🥕`;
    const who = await signUpConfirmed(newAddress(), emoji);
    expect(await problemOf(attempt(who.email, '🌱'.repeat(64)))).toMatchObject({ code: 'not-signed-in' });
    await attempt(who.email, emoji);
    const long = `${'x y'.repeat(42)}ab`;
    expect([...long]).toHaveLength(128);
    const other = await signUpConfirmed(newAddress(), long);
    expect(await problemOf(attempt(other.email, long.slice(0, 127)))).toMatchObject({ code: 'not-signed-in' });
    await attempt(other.email, long);
    for (const password of ['sevench', `${long}c`]) {
      const problem = await problemOf(signUpAs(newAddress(), { password }));
      expect(problem.fields?.password).toMatch(/8 characters|128 characters/);
    }
  });

  it('[E 5] that everybody tries first, and those made of the product, are refused', async () => {
    for (const password of ['password1', 'loamline2026', 'Loamline!!', 'iloveyou1', 'aaaaaaaaaa', 'Compost123']) {
      expect(passwordObjection(password, 'a@garden.test'), password).not.toBeNull();
    }
    expect(passwordObjection('harrow-keeper', 'harrow-keeper@garden.test')).toMatch(/your address/);
    expect(passwordObjection(GOOD_PASSWORD, 'a@garden.test')).toBeNull();
    const { default: list } = await import('@/lib/data/people/commonPasswords.json');
    const words = list.words.split(' ');
    expect(new Set(words).size).toBeGreaterThanOrEqual(3000);
    expect(words.filter((word) => passwordObjection(word, 'a@garden.test') === null)).toEqual([]);
    const problem = await problemOf(signUpAs(newAddress(), { password: 'password1' }));
    expect(problem).toMatchObject({ code: 'invalid', fields: { password: expect.stringContaining('tried first') } });
  });
});

describe('signing in', () => {
  it('[E 7] says the same for an unknown address, a wrong password and an unconfirmed address', async () => {
    const known = await signUpConfirmed();
    const unconfirmed = newAddress();
    await signUpAs(unconfirmed);
    const unknown = await problemOf(attempt(newAddress(), GOOD_PASSWORD));
    const wrong = await problemOf(attempt(known.email, 'not this one at all'));
    const waiting = await problemOf(attempt(unconfirmed, GOOD_PASSWORD));
    const said = [unknown, wrong, waiting].map(({ code, sentence, reason }) => ({ code, sentence, reason }));
    expect(said[1]).toEqual(said[0]);
    expect(said[2]).toEqual(said[0]);
  });

  it('[E 7] compares a hash of nothing for an unknown address, and that hash opens nothing', async () => {
    const turns: number[] = [];
    const watch = setInterval(() => turns.push(hashingNow().running), 1);
    await problemOf(attempt(newAddress(), GOOD_PASSWORD));
    clearInterval(watch);
    expect(Math.max(...turns)).toBe(1);
    expect(await fitsPassword(undefined, 'nobody has this password')).toBe(false);
    expect(await fitsPassword('$argon2id$none', 'nobody has this password')).toBe(false);
  });

  it('[E 8] answers the 6th wrong try with 429 and Retry-After, doubles the wait, and lets a reset through', async () => {
    const who = await signUpConfirmed();
    for (let turn = 1; turn <= 5; turn += 1)
      expect((await problemOf(attempt(who.email, `wrong one ${turn}`))).status).toBe(401);
    const sixth = await problemOf(attempt(who.email, 'wrong one 6'));
    expect(sixth).toMatchObject({ status: 429, retryAfterSeconds: 60 });
    expect((await problemOf(attempt(who.email, GOOD_PASSWORD))).status).toBe(429);

    await world.owner()`update sign_in_attempt set expire = 1 where key like 'try:%'`;
    for (let turn = 1; turn <= 5; turn += 1) await problemOf(attempt(who.email, `wrong two ${turn}`));
    expect(await problemOf(attempt(who.email, 'wrong two 6'))).toMatchObject({ status: 429, retryAfterSeconds: 120 });

    const ctx = await ctxNobody();
    await requestReset({ ctx, input: { email: who.email } });
    const next = 'four barrows of leaf mould';
    await performReset({ ctx, input: { token: await linkIn(who.email, 'reset-password'), password: next } });
    await attempt(who.email, next);
  });

  it('[E 8] counts tries that come all at once', async () => {
    const who = await signUpConfirmed();
    const answers = await Promise.all(
      Array.from({ length: 20 }, (_, n) => problemOf(attempt(who.email, `guess ${n} of many`))),
    );
    expect(answers.filter((problem) => problem.status === 401)).toHaveLength(5);
    expect(answers.filter((problem) => problem.status === 429)).toHaveLength(15);
  });

  it('[E 8] counts per network address too, once the settings say how to know it', async () => {
    const from = { ...(await ctxNobody()), ip: '203.0.113.7' };
    const guess = (n: number) =>
      problemOf(signIn({ ctx: from, input: { email: `nobody-${n}@garden.test`, password: 'guess' } }));
    for (let n = 0; n < 40; n += 1) expect((await guess(n)).status).toBe(401);
    expect((await guess(40)).status).toBe(429);
  });

  it('[E 9] keeps the count in PostgreSQL, under keys that hold no address', async () => {
    const who = await signUpConfirmed();
    await problemOf(attempt(who.email, 'a wrong one'));
    const rows = await database().select().from(signInAttempt);
    expect(rows.some((row) => row.key.startsWith('try:') && row.points === 1)).toBe(true);
    expect(rows.filter((row) => row.key.includes('@'))).toEqual([]);
  });

  it('[E 11] no account comes with an empty, migrated database', async () => {
    const { createTestDatabase } = await import('../support/database');
    const { connect } = await import('@/db/client');
    const fresh = await createTestDatabase();
    const { db, client } = connect(fresh.appUrl, { max: 1, applicationName: 'test' });
    expect(await db.select().from(person)).toEqual([]);
    expect(await db.select().from(session)).toEqual([]);
    await client.end();
    await fresh.drop();
  });
});

describe('links in mails', () => {
  it('[E 64] are 256 bits, kept as a hash, used once, for one purpose, and tied to the address', async () => {
    const email = newAddress();
    await signUpAs(email);
    const secret = await linkIn(email, 'verify-address');
    expect(Buffer.from(secret, 'base64url')).toHaveLength(32);
    const rows = await database().select().from(token);
    expect(JSON.stringify(rows)).not.toContain(secret);
    const ctx = await ctxNobody();
    const asReset = await problemOf(performReset({ ctx, input: { token: secret, password: GOOD_PASSWORD } }));
    expect(asReset.status).toBe(410);
    await database()
      .update(person)
      .set({ email: `moved-${email}` })
      .where(eq(person.email, email));
    expect((await problemOf(verifyAddress({ ctx, input: { token: secret } }))).status).toBe(410);
    await database()
      .update(person)
      .set({ email })
      .where(eq(person.email, `moved-${email}`));
    const both = await Promise.allSettled([
      verifyAddress({ ctx, input: { token: secret } }),
      verifyAddress({ ctx, input: { token: secret } }),
    ]);
    expect(both.filter((one) => one.status === 'fulfilled')).toHaveLength(1);
    expect((await problemOf(verifyAddress({ ctx, input: { token: secret } }))).status).toBe(410);
  });

  it('[E 65] a link to confirm stands 24 hours, one to reset 30 minutes', async () => {
    const email = newAddress();
    await signUpAs(email);
    const confirm = await linkIn(email, 'verify-address');
    const known = await signUpConfirmed();
    await requestReset({ ctx: await ctxNobody(), input: { email: known.email } });
    const reset = await linkIn(known.email, 'reset-password');
    try {
      await world.moveClock(HOUR / 2 + 1);
      const late = { ctx: await ctxNobody(), input: { token: reset, password: 'another long enough one' } };
      expect((await problemOf(performReset(late))).status).toBe(410);
      await world.moveClock(24 * HOUR + 1);
      expect((await problemOf(verifyAddress({ ctx: await ctxNobody(), input: { token: confirm } }))).status).toBe(410);
      await world.moveClock(24 * HOUR - 60);
      await verifyAddress({ ctx: await ctxNobody(), input: { token: confirm } });
    } finally {
      await world.moveClock(0);
    }
  });

  it('[E 66] asking for a reset changes nothing, answers the same for all, and mails at most three an hour', async () => {
    const who = await signUpConfirmed();
    const before = await rowOf(who.email);
    const answers = [];
    for (let turn = 0; turn < 4; turn += 1) {
      answers.push(await requestReset({ ctx: await ctxNobody(), input: { email: who.email } }));
    }
    const stranger = newAddress();
    expect(await requestReset({ ctx: await ctxNobody(), input: { email: stranger } })).toEqual({ email: stranger });
    expect(new Set(answers.map((answer) => JSON.stringify(answer)))).toEqual(
      new Set([JSON.stringify({ email: who.email })]),
    );
    expect(await mailsTo(who.email, 'reset-password')).toHaveLength(3);
    expect(await mailsTo(stranger)).toEqual([]);
    expect(await rowOf(who.email)).toEqual(before);
    await attempt(who.email, GOOD_PASSWORD);
  });

  it('[E 67] may be looked at any number of times; only the button uses them up', async () => {
    const email = newAddress();
    await signUpAs(email);
    const secret = await linkIn(email, 'verify-address');
    const ctx = await ctxNobody();
    for (let turn = 0; turn < 3; turn += 1) {
      expect(await lookAtVerification({ ctx, input: { token: secret } })).toEqual({ email, name: 'Row Keeper' });
    }
    await verifyAddress({ ctx, input: { token: secret } });
  });

  it('[E 68] a reset ends every session, mails the owner and signs nobody in', async () => {
    const who = await signUpConfirmed();
    await attempt(who.email, GOOD_PASSWORD);
    await attempt(who.email, GOOD_PASSWORD);
    const open = () => database().select().from(session).where(eq(session.userId, who.id));
    expect(await open()).toHaveLength(2);
    const ctx = await ctxNobody();
    await requestReset({ ctx, input: { email: who.email } });
    const password = 'clay over gravel over clay';
    const answer = await performReset({ ctx, input: { token: await linkIn(who.email, 'reset-password'), password } });
    expect(answer).toEqual({ email: who.email });
    expect(await open()).toEqual([]);
    expect(await mailsTo(who.email, 'password-changed')).toHaveLength(1);
    expect((await problemOf(attempt(who.email, GOOD_PASSWORD))).status).toBe(401);
    await attempt(who.email, password);
  });
});

describe('signing up', () => {
  it('answers the same for a known address, whose owner is told by mail; nothing of the account changes', async () => {
    const who = await signUpConfirmed();
    const before = await rowOf(who.email);
    const known = await signUpAs(who.email.toUpperCase(), { name: 'Somebody Else' });
    const fresh = await signUpAs(newAddress());
    expect(Object.keys(known)).toEqual(Object.keys(fresh));
    expect(known.ticket).toMatch(/^[\w-]{43}$/);
    expect(await rowOf(who.email)).toEqual(before);
    const [mail] = await mailsTo(who.email, 'address-taken');
    expect(mail?.text).not.toMatch(/\/(verify|reset)\/[\w-]{43}/);
    await signUpAs(who.email);
    expect(await mailsTo(who.email, 'address-taken')).toHaveLength(1);
  });

  it('a link confirms the name and password of its own sign-up, not those somebody else typed for the address', async () => {
    const email = newAddress();
    await signUpAs(email, { name: 'True Owner', password: 'the first and true one' });
    const mine = await linkIn(email, 'verify-address');
    await signUpAs(email, { name: 'Somebody Else', password: 'planted by a stranger' });
    await verifyAddress({ ctx: await ctxNobody(), input: { token: mine } });
    expect((await rowOf(email))?.name).toBe('True Owner');
    expect((await problemOf(attempt(email, 'planted by a stranger'))).status).toBe(401);
    await attempt(email, 'the first and true one');
  });

  it('sends another link on request, and says the same for addresses that need none', async () => {
    const email = newAddress();
    await signUpAs(email);
    const ctx = await ctxNobody();
    expect(await resendVerification({ ctx, input: { email } })).toEqual({ email });
    expect(await mailsTo(email, 'verify-address')).toHaveLength(2);
    const known = await signUpConfirmed();
    expect(await resendVerification({ ctx, input: { email: known.email } })).toEqual({ email: known.email });
    expect(await mailsTo(known.email, 'verify-address')).toHaveLength(1);
    await verifyAddress({ ctx, input: { token: await linkIn(email, 'verify-address') } });
    await attempt(email, GOOD_PASSWORD);
  });

  it('a mistyped address is changed: the stranger’s link stops working and no account stays there', async () => {
    const wrong = newAddress();
    const right = newAddress();
    const { ticket } = await signUpAs(wrong);
    const dead = await linkIn(wrong, 'verify-address');
    await signUpAs(right, { replaces: ticket });
    const ctx = await ctxNobody();
    expect((await problemOf(verifyAddress({ ctx, input: { token: dead } }))).status).toBe(410);
    expect(await rowOf(wrong)).toBeUndefined();
    await verifyAddress({ ctx, input: { token: await linkIn(right, 'verify-address') } });
    const { ticket: later } = await signUpAs(newAddress());
    await signUpAs(newAddress(), { replaces: later });
    expect(await rowOf(right)).toBeDefined();
  });

  it('stops after five mails an hour to one address, known or not', async () => {
    for (const email of [(await signUpConfirmed()).email, newAddress()]) {
      let problem: unknown;
      for (let turn = 0; turn < 6; turn += 1) {
        problem = await signUpAs(email).catch((error: unknown) => error);
      }
      expect(problem).toMatchObject({ status: 429 });
    }
  });
});
