import http from 'node:http';
import type { AddressInfo } from 'node:net';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { sendMail } from '@/lib/services/mail/mail';

let status = 200;
const provider = http.createServer((request, response) => {
  request.resume();
  response.writeHead(status, { 'content-type': 'application/json' });
  response.end(JSON.stringify(status === 200 ? { id: 'p-1' } : { statusCode: status, name: 'x', message: 'said so' }));
});
const LETTER = {
  to: 'row@garden.test',
  subject: 'A letter',
  html: '<p>A letter</p>',
  text: 'A letter',
  headers: {},
  attachments: [],
  idempotencyKey: 'letter/1',
};

beforeAll(async () => {
  await new Promise<void>((up) => provider.listen(0, '127.0.0.1', up));
  process.env.RESEND_BASE_URL = `http://127.0.0.1:${(provider.address() as AddressInfo).port}`;
});
afterAll(() => new Promise((down) => provider.close(down)));

describe('what the mail service answers', () => {
  it.each([
    [200, 'sent'],
    [400, 'refused'],
    [401, 'later'],
    [403, 'later'],
    [409, 'later'],
    [422, 'refused'],
    [429, 'later'],
    [500, 'later'],
    [503, 'later'],
  ])('%d means %s', async (code, means) => {
    status = code;
    const answer = await sendMail(LETTER);
    expect(answer.ok ? 'sent' : answer.reason).toBe(means);
  });
});
