import { eq } from 'drizzle-orm';
import { describe, expect, it } from 'vitest';
import { person, session } from '@/db/schema';
import { makeContext } from '@/lib/data/context';
import { database } from '@/lib/data/database';
import { changePassword } from '@/lib/data/people/changePassword';
import { actorOfCookie } from '@/lib/data/people/session';
import { signIn } from '@/lib/data/people/signIn';
import { signOut } from '@/lib/data/people/signOut';
import { signOutEverywhere } from '@/lib/data/people/signOutEverywhere';
import { updateMe } from '@/lib/data/people/updateMe';
import { ctxNobody, type TestPerson, useWorld } from '../support/factory';
import { GOOD_PASSWORD, mailsTo, problemOf, signUpConfirmed } from '../support/people';

const world = useWorld();
const DAY = 24 * 3600;

const secretOf = (setCookie: string) => setCookie.match(/^__Host-loamline=([^;]*)/)?.[1] ?? '';
async function open(who: TestPerson, over: { sharedComputer?: boolean; cookie?: string } = {}) {
  const actor = await actorOfCookie(over.cookie);
  const input = { email: who.email, password: GOOD_PASSWORD, sharedComputer: over.sharedComputer ?? false };
  const { setCookie } = await signIn({ ctx: await makeContext(actor), input });
  return { setCookie, secret: secretOf(setCookie) };
}
const isIn = async (secret: string) => (await actorOfCookie(secret)).kind === 'person';
const asHolder = async (secret: string) => makeContext(await actorOfCookie(secret));

describe('a session', () => {
  it('[E 13] carries 256 bits of which the database holds only the hash', async () => {
    const { secret } = await open(await signUpConfirmed());
    expect(Buffer.from(secret, 'base64url')).toHaveLength(32);
    const tables = await world.owner()<{ name: string }[]>`
      select c.relname as name from pg_class c where c.relkind = 'r' and c.relnamespace = 'public'::regnamespace`;
    for (const { name } of tables) {
      const rows = await world.owner()`select 1 from ${world.owner()(name)} t where t::text like ${`%${secret}%`}`;
      expect(rows, name).toHaveLength(0);
    }
    expect(await isIn(secret)).toBe(true);
    expect(await isIn(secret.replace(/.$/, secret.endsWith('A') ? 'B' : 'A'))).toBe(false);
  });

  it('[E 14] sits in a __Host- cookie: Secure, HttpOnly, Lax, for the whole site and no other host', async () => {
    const { setCookie } = await open(await signUpConfirmed());
    const parts = setCookie.split('; ');
    expect(parts[0]).toMatch(/^__Host-loamline=[\w-]{43}$/);
    expect(new Set(parts.slice(1))).toEqual(
      new Set(['HttpOnly', 'Secure', 'SameSite=Lax', 'Path=/', `Max-Age=${30 * DAY}`]),
    );
  });

  it('[E 15] is a new one at each sign-in, and the one the browser came with is over', async () => {
    const who = await signUpConfirmed();
    const first = await open(who);
    const second = await open(who, { cookie: first.secret });
    expect(second.secret).not.toBe(first.secret);
    expect(await isIn(first.secret)).toBe(false);
    expect(await isIn(second.secret)).toBe(true);
  });

  it('[E 16] ends after 7 idle days, after 30 days in any case, and after 12 hours on a shared computer', async () => {
    const who = await signUpConfirmed();
    const idle = await open(who);
    const used = await open(who);
    const shared = await open(who, { sharedComputer: true });
    expect(shared.setCookie).not.toContain('Max-Age');
    try {
      await world.moveClock(DAY / 2 + 60);
      expect(await isIn(shared.secret)).toBe(false);
      for (const day of [5, 10, 15, 20, 25, 29.9]) {
        await world.moveClock(day * DAY);
        expect(await isIn(used.secret), `day ${day}`).toBe(true);
        if (day > 7) expect(await isIn(idle.secret)).toBe(false);
      }
      await world.moveClock(30 * DAY + 60);
      expect(await isIn(used.secret)).toBe(false);
      expect(await isIn((await open(who)).secret)).toBe(true);
    } finally {
      await world.moveClock(0);
    }
  });

  it('[E 17] is deleted at sign-out', async () => {
    const who = await signUpConfirmed();
    const { secret } = await open(who);
    const { setCookie } = await signOut({ ctx: await asHolder(secret), input: {} });
    expect(setCookie).toMatch(/^__Host-loamline=; .*Max-Age=0/);
    expect(await database().select().from(session).where(eq(session.userId, who.id))).toEqual([]);
  });

  it('[E 20] is not written at each request: ten requests leave the row as it was', async () => {
    const who = await signUpConfirmed();
    const { secret } = await open(who);
    const row = () => database().select().from(session).where(eq(session.userId, who.id));
    const versions = () => world.owner()`select xmin::text as version from session where person_id = ${who.id}`;
    const [before, version] = [await row(), await versions()];
    for (let turn = 0; turn < 10; turn += 1) expect(await isIn(secret)).toBe(true);
    expect(await row()).toEqual(before);
    expect(await versions()).toEqual(version);
  });

  it('[E 21] of somebody who was disabled is over at the next request, and no new one opens', async () => {
    const who = await signUpConfirmed();
    const { secret } = await open(who);
    await database().update(person).set({ disabledAt: new Date() }).where(eq(person.id, who.id));
    expect(await isIn(secret)).toBe(false);
    expect((await problemOf(open(who))).status).toBe(401);
  });

  it('ends everywhere on request', async () => {
    const who = await signUpConfirmed();
    const secrets = [(await open(who)).secret, (await open(who)).secret];
    await signOutEverywhere({ ctx: await asHolder(secrets[0] ?? ''), input: {} });
    for (const secret of secrets) expect(await isIn(secret)).toBe(false);
  });
});

describe('own settings', () => {
  it('[E 12] a new password needs the current one, mails the owner, and signs the other devices out', async () => {
    const who = await signUpConfirmed();
    const here = await open(who);
    const there = await open(who);
    const ctx = await asHolder(here.secret);
    const next = 'a ditch along the north edge';
    const wrong = await problemOf(changePassword({ ctx, input: { currentPassword: 'not mine', password: next } }));
    expect(wrong.fields?.currentPassword).toMatch(/not your current/);
    expect(await mailsTo(who.email, 'password-changed')).toEqual([]);
    const { setCookie } = await changePassword({ ctx, input: { currentPassword: GOOD_PASSWORD, password: next } });
    expect(await isIn(here.secret)).toBe(false);
    expect(await isIn(there.secret)).toBe(false);
    expect(await isIn(secretOf(setCookie))).toBe(true);
    expect((await mailsTo(who.email, 'password-changed'))[0]?.text).toContain('Every other device was signed out');
    expect((await problemOf(open(who))).status).toBe(401);
  });

  it('leaves the other devices signed in when asked to', async () => {
    const who = await signUpConfirmed();
    const here = await open(who);
    const there = await open(who);
    const input = { currentPassword: GOOD_PASSWORD, password: 'a ditch along the north edge', endOtherSessions: false };
    await changePassword({ ctx: await asHolder(here.secret), input });
    expect(await isIn(there.secret)).toBe(true);
  });

  it('are kept one by one, and refused with a sentence when they make no sense', async () => {
    const who = await signUpConfirmed();
    const { secret } = await open(who);
    const saved = await updateMe({
      ctx: await asHolder(secret),
      input: { units: 'metric', paper: 'a4', timeZone: 'Australia/Lord_Howe', mailHour: 6 },
    });
    expect(saved).toMatchObject({
      name: who.name,
      units: 'metric',
      paper: 'a4',
      timeZone: 'Australia/Lord_Howe',
      mailHour: 6,
    });
    expect((await asHolder(secret)).actor).toMatchObject({
      person: { timeZone: 'Australia/Lord_Howe', locale: 'en-GB' },
    });
    const ctx = await asHolder(secret);
    for (const input of [{ timeZone: 'Atlantis/Deep' }, { mailHour: 24 }, { name: 'two\nlines' }, { name: '  ' }]) {
      const problem = await problemOf(updateMe({ ctx, input }));
      expect(problem.code, JSON.stringify(input)).toBe('invalid');
      expect(Object.keys(problem.fields ?? {})).toEqual(Object.keys(input));
    }
  });

  it('[E 36] take no field that is not a setting', async () => {
    const who = await signUpConfirmed();
    const { secret } = await open(who);
    const planted = { name: 'New Name', email: 'taken@garden.test', emailVerifiedAt: null } as { name: string };
    const problem = await problemOf(updateMe({ ctx: await asHolder(secret), input: planted }));
    expect(problem.code).toBe('invalid');
    const [row] = await database().select().from(person).where(eq(person.id, who.id));
    expect(row).toMatchObject({ name: who.name, email: who.email });
    expect(await ctxNobody()).toMatchObject({ actor: { kind: 'nobody' } });
  });
});
