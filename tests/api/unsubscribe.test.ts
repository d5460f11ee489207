import { eq } from 'drizzle-orm';
import { describe, expect, it } from 'vitest';
import { POST } from '@/app/api/v1/mail/unsubscribe/route';
import { mailPreference, token } from '@/db/schema';
import { lookAtUnsubscribe } from '@/lib/data/mail/lookAtUnsubscribe';
import { hashSecret } from '@/lib/data/people/secrets';
import { withPeople } from '@/lib/data/transaction';
import { ctxNobody, makePerson, type TestPerson, useWorld } from '../support/factory';

useWorld();

const wantedBy = (who: TestPerson) =>
  withPeople((tx) => tx.select().from(mailPreference).where(eq(mailPreference.personId, who.id)));

async function linkOf(who: TestPerson, expiresAt = new Date(Date.now() + 3_600_000)): Promise<string> {
  const secret = `${who.id}${who.id}`.replaceAll('-', '');
  await withPeople((tx) =>
    tx.insert(token).values({
      id: hashSecret(secret),
      purpose: 'unsubscribe',
      personId: who.id,
      email: who.email,
      payload: { kind: 'reminder' },
      expiresAt,
    }),
  );
  return secret;
}

/** RFC 8058, section 3.1: the mail program posts this very form, without cookies, from an origin of its own. */
const press = (secret: string, headers: Record<string, string> = {}) =>
  POST(
    new Request(`http://127.0.0.1:3000/api/v1/mail/unsubscribe?token=${secret}`, {
      method: 'POST',
      headers: {
        'content-type': 'application/x-www-form-urlencoded',
        origin: 'https://post.elsewhere.example',
        'sec-fetch-site': 'cross-site',
        ...headers,
      },
      body: 'List-Unsubscribe=One-Click',
    }),
    { params: Promise.resolve({}) },
  );

describe('[E 23] one-click unsubscribe', () => {
  it('works from a mail program: a form body, a foreign origin, no cookie; and once more', async () => {
    const who = await makePerson();
    const other = await makePerson();
    const secret = await linkOf(who);
    for (const turn of ['first', 'again']) {
      const answer = await press(secret);
      expect([turn, answer.status, await answer.json()]).toEqual([turn, 200, { done: true }]);
    }
    expect((await wantedBy(who)).map((row) => [row.kind, row.wanted])).toEqual([['reminder', false]]);
    expect(await wantedBy(other)).toEqual([]);
  });

  it('takes the form of several parts as well', async () => {
    const who = await makePerson();
    const form = new FormData();
    form.set('List-Unsubscribe', 'One-Click');
    const answer = await POST(
      new Request(`http://127.0.0.1:3000/api/v1/mail/unsubscribe?token=${await linkOf(who)}`, {
        method: 'POST',
        headers: { origin: 'https://post.elsewhere.example' },
        body: form,
      }),
      { params: Promise.resolve({}) },
    );
    expect(answer.status).toBe(200);
    expect((await wantedBy(who)).map((row) => row.wanted)).toEqual([false]);
  });

  it('a wrong or ended link is told so in a sentence, and changes nothing', async () => {
    const who = await makePerson();
    const ended = await linkOf(who, new Date(Date.now() - 1000));
    for (const secret of [ended, `${'x'.repeat(43)}`]) {
      const answer = await press(secret);
      expect(answer.status).toBe(410);
      expect((await answer.json()).detail).toContain('no longer works');
    }
    expect(await wantedBy(who)).toEqual([]);
  });

  it('looking at the page behind the link changes nothing, and says what stands', async () => {
    const who = await makePerson();
    const secret = await linkOf(who);
    const look = async () => lookAtUnsubscribe({ ctx: await ctxNobody(), input: { token: secret } });
    expect(await look()).toEqual({ name: who.name, stopped: false });
    expect(await wantedBy(who)).toEqual([]);
    await press(secret);
    expect(await look()).toEqual({ name: who.name, stopped: true });
    const ended = await linkOf(await makePerson(), new Date(Date.now() - 1000));
    await expect(lookAtUnsubscribe({ ctx: await ctxNobody(), input: { token: ended } })).rejects.toMatchObject({
      code: 'gone',
    });
  });
});
