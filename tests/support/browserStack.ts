import { readFile } from 'node:fs/promises';
import path from 'node:path';
import postgres from 'postgres';
import { until } from './until';

export type Stack = { origin: string; mailbox: string };

/** What the started stack told about itself; see fake-services/test.mjs. */
export function stack(): Stack {
  return { origin: setting('APP_ORIGIN'), mailbox: setting('MAILBOX_URL') };
}

function setting(name: string): string {
  const value = process.env[name];
  if (!value) throw new Error(`${name} is not set: tests of tests/e2e run against a started stack (npm test).`);
  return value;
}

export type BoxMail = {
  id: string;
  to: string[];
  subject: string;
  text: string;
  html: string;
  headers: Record<string, string>;
  attachments: { filename: string; content_type: string; content: string }[];
};

/** All mail to an address, newest first. */
export async function mailTo(address: string): Promise<BoxMail[]> {
  const answer = await fetch(`${stack().mailbox}/box.json?to=${encodeURIComponent(address)}`);
  return (await answer.json()) as BoxMail[];
}

/** The newest mail to an address whose subject has these words, as soon as it is in the box. */
export async function newMail(address: string, words: RegExp): Promise<BoxMail> {
  const find = async () => (await mailTo(address)).find(({ subject }) => words.test(subject));
  const mail = await until(`a mail to ${address} about ${words}`, find, (found) => found !== undefined, 30_000);
  if (!mail) throw new Error('There is none.');
  return mail;
}

/** The way through the application's own page that a mail's text carries. */
export function linkIn(mail: BoxMail, part: string): string {
  const link = [...mail.text.matchAll(/https?:\/\/\S+/g)].map(([url]) => url).find((url) => url.includes(part));
  if (!link) throw new Error(`The mail “${mail.subject}” has no link with ${part}:\n${mail.text}`);
  return link.slice(new URL(link).origin.length);
}

/** Sets the product's clock, which runs on from there; null puts it back to the machine's. */
export async function setClock(moment: string | null): Promise<void> {
  const seconds = moment === null ? 0 : Math.round((Date.parse(moment) - Date.now()) / 1000);
  const owner = postgres(setting('DATABASE_OWNER_URL'), { max: 1, onnotice: () => {} });
  try {
    await owner`insert into clock_offset (only_row, seconds) values (true, ${seconds})
      on conflict (only_row) do update set seconds = excluded.seconds`;
  } finally {
    await owner.end();
  }
}

export type Caller = {
  get: <T>(place: string) => Promise<T>;
  send: <T>(method: 'POST' | 'PUT' | 'PATCH', place: string, body: unknown) => Promise<T>;
  upload: (siteId: string, file: string, plotId?: string, batchFileId?: string) => Promise<string>;
};

/** The same API as the screens, for what a test needs to stand there before it begins. */
export function callAs(cookie: string): Caller {
  const call = async <T>(method: string, place: string, init: RequestInit = {}): Promise<T> => {
    const headers = { cookie, origin: stack().origin, ...init.headers };
    const answer = await fetch(`${stack().origin}/api/v1${place}`, { ...init, method, headers });
    if (!answer.ok) throw new Error(`${method} ${place} answered ${answer.status}: ${await answer.text()}`);
    return (await answer.json()) as T;
  };
  const get = <T>(place: string) => call<T>('GET', place);
  return {
    get,
    send: (method, place, body) =>
      call(method, place, { body: JSON.stringify(body), headers: { 'content-type': 'application/json' } }),
    upload: async (siteId, file, plotId, batchFileId) => {
      const form = new FormData();
      form.set('file', new Blob([await readFile(file)]), path.basename(file));
      if (plotId) form.set('plotId', plotId);
      if (batchFileId) form.set('batchFileId', batchFileId);
      const { reportId } = await call<{ reportId: string }>('POST', `/sites/${siteId}/uploads`, { body: form });
      const place = `/sites/${siteId}/reports/${reportId}`;
      const isRead = ({ state }: { state: string }) => state !== 'received' && state !== 'reading';
      await until(`${file} is read`, () => get<{ state: string }>(place), isRead, 60_000);
      return reportId;
    },
  };
}
