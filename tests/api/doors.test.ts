import { eq } from 'drizzle-orm';
import { describe, expect, it } from 'vitest';
import { PATCH as updateMeRoute } from '@/app/api/v1/people/me/route';
import { POST as signInRoute, DELETE as signOutRoute } from '@/app/api/v1/session/route';
import { person } from '@/db/schema';
import { database } from '@/lib/data/database';
import { env } from '@/lib/env';
import { cookieFor, makePerson, makePlot, makeSite, type TestPerson, useWorld } from '../support/factory';
import { GOOD_PASSWORD, signUpConfirmed } from '../support/people';
import { allRoutes, callRoute } from './routes';

useWorld();

const none = { params: Promise.resolve({}) };
const ask = (headers: Record<string, string>, body: BodyInit = '{"name":"Changed"}', method = 'PATCH') =>
  new Request('http://127.0.0.1:3000/api/v1/people/me', {
    method,
    headers: { 'content-type': 'application/json', ...headers },
    body,
  });
const nameOf = async (who: TestPerson) =>
  (await database().select({ name: person.name }).from(person).where(eq(person.id, who.id)))[0]?.name;

describe('[E 23] a request that changes something and carries our cookie', () => {
  const ours = () => env().APP_ORIGIN;
  const cases: [site: string | null, origin: 'ours' | 'other' | null, passes: boolean][] = [
    ['same-origin', 'ours', true],
    ['same-origin', null, true],
    ['none', null, true],
    ['same-site', 'ours', false],
    ['cross-site', 'other', false],
    ['cross-site', 'ours', false],
    [null, 'ours', true],
    [null, 'other', false],
    [null, null, false],
  ];
  it.each(cases)('Sec-Fetch-Site %s, Origin %s: passes %s', async (site, origin, passes) => {
    const who = await makePerson();
    const headers = {
      cookie: await cookieFor(who),
      ...(site === null ? {} : { 'sec-fetch-site': site }),
      ...(origin === null ? {} : { origin: origin === 'ours' ? ours() : 'https://elsewhere.example' }),
    };
    const { status } = await updateMeRoute(ask(headers), none);
    expect(status).toBe(passes ? 200 : 403);
    expect(await nameOf(who)).toBe(passes ? 'Changed' : who.name);
  });

  it('is refused when it brings a token as well', async () => {
    const who = await makePerson();
    const headers = { cookie: await cookieFor(who), authorization: 'Bearer abc', 'sec-fetch-site': 'same-origin' };
    const response = await updateMeRoute(ask(headers), none);
    expect(response.status).toBe(422);
    expect(await nameOf(who)).toBe(who.name);
  });

  it('[E 29] gets no leave for another origin to read the answer', async () => {
    const who = await makePerson();
    const headers = {
      cookie: await cookieFor(who),
      'sec-fetch-site': 'cross-site',
      origin: 'https://elsewhere.example',
    };
    const response = await updateMeRoute(ask(headers), none);
    expect([...response.headers.keys()].filter((name) => name.startsWith('access-control'))).toEqual([]);
  });
});

describe('a route without a parameter in its path', () => {
  it('is handed no params by the framework, and works', async () => {
    const who = await makePerson();
    const headers = { cookie: await cookieFor(who), 'sec-fetch-site': 'same-origin' };
    const { status } = await updateMeRoute(ask(headers), { params: Promise.resolve(undefined) });
    expect(status).toBe(200);
    expect(await nameOf(who)).toBe('Changed');
  });
});

describe('[E 63] a name that stands there twice', () => {
  const rename = async (query: string, body: string) => {
    const who = await makePerson();
    const headers = {
      cookie: await cookieFor(who),
      'sec-fetch-site': 'same-origin',
      'content-type': 'application/json',
    };
    const url = `http://127.0.0.1:3000/api/v1/people/me${query}`;
    const { status } = await updateMeRoute(new Request(url, { method: 'PATCH', headers, body }), none);
    return { status, changed: (await nameOf(who)) !== who.name };
  };

  it.each([
    ['in the query', '?name=One&name=Two', '{}'],
    ['in query and body', '?name=One', '{"name":"Two"}'],
  ])('%s is refused', async (_, query, body) => {
    expect(await rename(query, body)).toEqual({ status: 422, changed: false });
  });

  it('in path and body is refused', async () => {
    const [route] = (await allRoutes()).filter((one) => /\/plots\/\[plotId\]\/archive$/.test(one.path));
    if (!route) throw new Error('The route is not there.');
    const { id, people } = await makeSite();
    const plotId = await makePlot(id);
    const response = await callRoute(
      route,
      { siteId: id, plotId },
      {
        body: JSON.stringify({ plotId, version: 1 }),
        headers: { cookie: await cookieFor(people.owner), 'content-type': 'application/json' },
      },
    );
    expect(response.status).toBe(422);
  });
});

describe('[E 51] a character no text of the database can hold', () => {
  it('is refused with a sentence, not taken for a fault of ours', async () => {
    const { id, people } = await makeSite();
    const [route] = (await allRoutes()).filter(
      (one) => one.method === 'PUT' && /\/targets\/\[targetKey\]$/.test(one.path),
    );
    if (!route) throw new Error('The route is not there.');
    const bands = [{ analyte: 'soil_ph_water', low: 6, high: 7 }];
    const response = await callRoute(
      route,
      { siteId: id, targetKey: 'own-\u0000' },
      {
        body: JSON.stringify({ version: 1, name: 'Mine', bands }),
        headers: { cookie: await cookieFor(people.owner), 'content-type': 'application/json' },
      },
    );
    expect(response.status).toBe(422);
    expect(((await response.json()) as { detail: string }).detail).toContain('invisible character');
  });
});

describe('[E 25] a body that is not JSON', () => {
  it.each(['text/plain', 'application/x-www-form-urlencoded', 'multipart/form-data; boundary=x', ''])(
    '%j is 415',
    async (type) => {
      const who = await makePerson();
      const headers = { cookie: await cookieFor(who), 'sec-fetch-site': 'same-origin', 'content-type': type };
      expect((await updateMeRoute(ask(headers), none)).status).toBe(415);
      expect(await nameOf(who)).toBe(who.name);
    },
  );

  it('is 415 on every route that takes JSON', async () => {
    const routes = (await allRoutes()).filter((route) => route.method !== 'GET');
    const exempt = /\/uploads$|\/mail\/unsubscribe$/;
    expect(routes.length).toBeGreaterThan(15);
    for (const route of routes) {
      if (exempt.test(route.path)) continue;
      const response = await callRoute(route, {}, { body: 'name=x', headers: { 'content-type': 'text/plain' } });
      expect(response.status, route.name).toBe(415);
    }
  });

  it('cut short or too long is refused with a sentence', async () => {
    const cookie = await cookieFor(await makePerson());
    const headers = { cookie, 'sec-fetch-site': 'same-origin' };
    expect((await updateMeRoute(ask(headers, '{"name":'), none)).status).toBe(422);
    const large = await updateMeRoute(ask(headers, JSON.stringify({ name: 'x'.repeat(1024 * 1024) })), none);
    expect(large.status).toBe(413);
    expect(((await large.json()) as { detail: string }).detail).toContain('1024 KiB');
  });
});

describe('signing in and out over the API', () => {
  const session = (method: 'POST' | 'DELETE', headers: Record<string, string>, body?: object) =>
    new Request('http://127.0.0.1:3000/api/v1/session', {
      method,
      headers: { 'content-type': 'application/json', 'sec-fetch-site': 'same-origin', ...headers },
      ...(body ? { body: JSON.stringify(body) } : {}),
    });

  it('[E 14] sets the cookie, and no HSTS over http', async () => {
    const who = await signUpConfirmed();
    const response = await signInRoute(session('POST', {}, { email: who.email, password: GOOD_PASSWORD }), none);
    expect(response.status).toBe(200);
    const cookie = response.headers.get('set-cookie') ?? '';
    expect(cookie).toMatch(/^__Host-loamline=[\w-]{43};/);
    expect(cookie).not.toMatch(/domain=/i);
    expect(response.headers.get('cache-control')).toBe('no-store');
    expect(response.headers.has('strict-transport-security')).toBe(false);
  });

  it('[E 8] says 429 with Retry-After, as a sentence', async () => {
    const who = await signUpConfirmed();
    let response = new Response();
    for (let turn = 0; turn < 6; turn += 1) {
      response = await signInRoute(session('POST', {}, { email: who.email, password: 'wrong again' }), none);
    }
    expect(response.status).toBe(429);
    expect(response.headers.get('retry-after')).toBe('60');
    expect(((await response.json()) as { detail: string }).detail).toContain('60 seconds');
  });

  it('[E 17] takes cookie and stored pages away, and the old cookie opens nothing', async () => {
    const cookie = await cookieFor(await makePerson());
    const response = await signOutRoute(session('DELETE', { cookie }), none);
    expect(response.status).toBe(200);
    expect(response.headers.get('clear-site-data')).toBe('"cache", "storage"');
    expect(response.headers.get('set-cookie')).toMatch(/^__Host-loamline=;.*Max-Age=0/);
    const after = await updateMeRoute(ask({ cookie, 'sec-fetch-site': 'same-origin' }), none);
    expect(after.status).toBe(401);
    expect((await signOutRoute(session('DELETE', { cookie }), none)).status).toBe(200);
  });
});
