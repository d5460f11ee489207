import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { Resend } from 'resend';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { startMail } from './server.mjs';

const apiKey = 're_for_this_test_only';
let folder: string;
let mailbox: Awaited<ReturnType<typeof startMail>>;
let resend: Resend;
let clock = new Date('2026-04-01T07:30:00Z');

const start = () => startMail({ folder, port: 0, apiKey, now: () => clock });
const clientOf = (key = apiKey) => new Resend(key, { baseUrl: mailbox.url });

const mail = (to: string, subject = 'Sample the leek bed on 12 April') => ({
  from: 'Loamline <post@mail.loamline.test>',
  to,
  subject,
  text: 'Open http://127.0.0.1:3000/today. Then sample.',
  html: '<p>Open <a href="http://127.0.0.1:3000/today">today</a><script>alert(1)</script></p>',
});

type Kept = {
  id: string;
  to: string[];
  subject: string;
  headers: Record<string, string>;
  idempotency_key: string | null;
};

async function box(to: string): Promise<Kept[]> {
  return (await fetch(`${mailbox.url}/box.json?to=${encodeURIComponent(to)}`)).json() as Promise<Kept[]>;
}

async function control(orders: Record<string, unknown>): Promise<void> {
  expect((await fetch(`${mailbox.url}/_control`, { method: 'POST', body: JSON.stringify(orders) })).status).toBe(200);
}

beforeAll(async () => {
  folder = await mkdtemp(path.join(tmpdir(), 'mail-'));
  mailbox = await start();
  resend = clientOf();
});
afterAll(async () => {
  await mailbox.close();
  await rm(folder, { recursive: true });
});
beforeEach(() => fetch(`${mailbox.url}/_control`, { method: 'DELETE' }));

describe('sending', () => {
  it('keeps a mail with its headers and attachment, and tells about it', async () => {
    const { data, error } = await resend.emails.send({
      ...mail('Ada Grower <ada@plots.test>'),
      replyTo: 'help@loamline.test',
      headers: { 'List-Unsubscribe': '<https://loamline.test/u/abc>' },
      attachments: [{ filename: 'sample.ics', content: Buffer.from('BEGIN:VCALENDAR'), contentType: 'text/calendar' }],
    });
    expect(error).toBeNull();
    const id = data?.id ?? '';
    const [kept] = await box('ada@plots.test');
    expect(kept).toMatchObject({ id, headers: { 'List-Unsubscribe': '<https://loamline.test/u/abc>' } });
    const told = await resend.emails.get(id);
    expect(told.data).toMatchObject({ id, to: ['Ada Grower <ada@plots.test>'], last_event: 'delivered' });
    const attachment = await fetch(`${mailbox.url}/mail/${id}/attachment/0`);
    expect(attachment.headers.get('content-disposition')).toBe("attachment; filename*=UTF-8''sample.ics");
    expect(await attachment.text()).toBe('BEGIN:VCALENDAR');
  });

  it('keeps a batch, or nothing of it when one mail is wrong', async () => {
    const sent = await resend.batch.send([mail('b1@plots.test'), mail('b2@plots.test')]);
    expect(sent.data?.data).toHaveLength(2);
    expect(await box('b2@plots.test')).toHaveLength(1);
    const wrong = await resend.batch.send([mail('b3@plots.test'), mail('not an address')]);
    expect(wrong.error).toMatchObject({ statusCode: 422, name: 'validation_error' });
    expect(await box('b3@plots.test')).toHaveLength(0);
  });

  it('refuses what the service refuses', async () => {
    const send = async (change: object) =>
      (await resend.emails.send({ ...mail('c@plots.test'), ...change })).error?.name;
    expect(await send({ from: 'nobody' })).toBe('invalid_from_address');
    expect(await send({ to: [] })).toBe('missing_required_field');
    expect(await send({ text: undefined, html: undefined })).toBe('missing_required_field');
    expect(await send({ subject: 'a\r\nBcc: x@plots.test' })).toBe('validation_error');
    expect(await send({ headers: { 'X-A': 'a\r\nBcc: x@plots.test' } })).toBe('validation_error');
    expect(await send({ attachments: [{ filename: 'a', content: '%%%' }] })).toBe('invalid_attachment');
    expect((await clientOf('re_wrong').emails.send(mail('c@plots.test'))).error?.name).toBe('invalid_api_key');
    expect((await fetch(`${mailbox.url}/emails`, { method: 'POST', body: '{}' })).status).toBe(401);
    expect((await resend.emails.get('none')).error?.name).toBe('not_found');
  });
});

describe('idempotency keys', () => {
  const send = (to: string, idempotencyKey: string, subject?: string) =>
    resend.emails.send(mail(to, subject), { idempotencyKey });

  it('sends one mail for one key, also after a restart and for a batch', async () => {
    const first = await send('d@plots.test', 'reminder/1');
    expect((await send('d@plots.test', 'reminder/1')).data?.id).toBe(first.data?.id);
    await mailbox.close();
    mailbox = await start();
    resend = clientOf();
    expect((await send('d@plots.test', 'reminder/1')).data?.id).toBe(first.data?.id);
    expect(await box('d@plots.test')).toHaveLength(1);
    const batch = () =>
      resend.batch.send([mail('d1@plots.test'), mail('d2@plots.test')], { idempotencyKey: 'digest/1' });
    expect((await batch()).data).toEqual((await batch()).data);
    expect(await box('d1@plots.test')).toHaveLength(1);
  });

  it('refuses another body under the same key, and a key of more than 256 characters', async () => {
    await send('e@plots.test', 'reminder/2');
    const { error } = await send('e@plots.test', 'reminder/2', 'Another subject');
    expect(error).toMatchObject({ statusCode: 409, name: 'invalid_idempotent_request' });
    expect((await send('e@plots.test', 'k'.repeat(257))).error?.name).toBe('invalid_idempotency_key');
    expect(await box('e@plots.test')).toHaveLength(1);
  });

  it('refuses a second request while the first is still under way', async () => {
    await control({ slow: 1, milliseconds: 200 });
    const both = await Promise.all([send('f@plots.test', 'reminder/3'), send('f@plots.test', 'reminder/3')]);
    expect(both.map(({ error }) => error?.name ?? 'sent').sort()).toEqual(['concurrent_idempotent_requests', 'sent']);
    expect(await box('f@plots.test')).toHaveLength(1);
  });

  it('forgets a key after 24 hours', async () => {
    await send('g@plots.test', 'reminder/4');
    clock = new Date(clock.getTime() + 24 * 60 * 60 * 1000 - 1);
    await send('g@plots.test', 'reminder/4');
    expect(await box('g@plots.test')).toHaveLength(1);
    clock = new Date(clock.getTime() + 1);
    await send('g@plots.test', 'reminder/4');
    expect(await box('g@plots.test')).toHaveLength(2);
  });
});

describe('misbehaving on demand', () => {
  it('fails with a status and Retry-After and keeps nothing', async () => {
    await control({ fail: 1, status: 429, retryAfter: 7 });
    const { error, headers } = await resend.emails.send(mail('h@plots.test'));
    expect(error).toMatchObject({ statusCode: 429, name: 'rate_limit_exceeded' });
    expect(headers?.['retry-after']).toBe('7');
    expect(await box('h@plots.test')).toHaveLength(0);
  });

  it('keeps the mail but loses the answer; the same key then finds it sent', async () => {
    await control({ lose: 1 });
    const send = () => resend.emails.send(mail('i@plots.test'), { idempotencyKey: 'reminder/5' });
    expect((await send()).error?.name).toBe('application_error');
    expect((await send()).data?.id).toBe((await box('i@plots.test'))[0]?.id);
    expect(await box('i@plots.test')).toHaveLength(1);
  });

  it('cuts the connection or answers nonsense', async () => {
    await control({ drop: 1 });
    expect((await resend.emails.send(mail('j@plots.test'))).error?.name).toBe('application_error');
    expect(await box('j@plots.test')).toHaveLength(0);
    await control({ garbage: 1 });
    expect((await resend.emails.send(mail('j@plots.test'))).error?.name).toBe('application_error');
  });
});

describe('the mailbox page', () => {
  it('lists newest first, narrows to an address, and escapes what a mail says', async () => {
    await resend.emails.send(mail('k@plots.test', 'First <b>'));
    await resend.emails.send(mail('k@plots.test', 'Second'));
    const page = await (await fetch(`${mailbox.url}/?to=k%40plots.test`)).text();
    expect(page.indexOf('Second')).toBeGreaterThan(0);
    expect(page.indexOf('Second')).toBeLessThan(page.indexOf('First &lt;b&gt;'));
    expect(page).not.toContain('ada@plots.test');
    expect(await (await fetch(`${mailbox.url}/?to=%3Cscript%3E`)).text()).not.toContain('<script>');
  });

  it('opens one: clickable text, HTML only in a sandbox without script', async () => {
    const [kept] = await box('k@plots.test');
    const page = await (await fetch(`${mailbox.url}/mail/${kept?.id}`)).text();
    expect(page).toContain('<a href="http://127.0.0.1:3000/today">http://127.0.0.1:3000/today</a>. Then');
    expect(page).not.toContain('alert(1)');
    expect(page).toMatch(/<iframe [^>]*sandbox="allow-popups/);
    const html = await fetch(`${mailbox.url}/mail/${kept?.id}/html`);
    expect(await html.text()).toContain('alert(1)');
    expect(html.headers.get('content-security-policy')).toMatch(/^sandbox (?!.*allow-scripts).*default-src 'none'/);
    expect((await fetch(`${mailbox.url}/mail/none`)).status).toBe(404);
  });
});
