import { randomUUID } from 'node:crypto';
import postgres from 'postgres';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { ACTS, ROLES, type Role } from '@/lib/access/table';
import { actorOfCookie, cookieFrom } from '@/lib/data/people/session';
import { cookieFor, makeSite, useWorld } from '../support/factory';
import { EXPECTED_GUARDS, mayByHand } from './acts';
import { makeParams } from './params';
import { allRoutes, callRoute, type Route } from './routes';

/**
 * [E 34] Every route on disk × {nobody, another site, viewer, helper, adviser, owner}. Each call gets a site of its own,
 * so that one answer never depends on the call before it.
 */
const routes = await allRoutes();
const world = useWorld();

const guardOf = (route: Route) => {
  const { guard } = route.handler.descriptor;
  return guard.kind === 'site' ? guard.act : guard.kind;
};
const bodyOf = async (response: Response) => Buffer.from(await response.arrayBuffer()).toString('base64');

async function fresh(author: Role = 'owner') {
  const site = await makeSite();
  return { site, params: await makeParams(site, site.people[author]) };
}

describe('the routes on disk', () => {
  it('are all found, and each names a guard and a summary', () => {
    expect(routes.length).toBeGreaterThan(25);
    for (const route of routes) {
      expect(route.handler.descriptor.summary, route.name).not.toBe('');
      expect(['public', 'person', ...ACTS], route.name).toContain(guardOf(route));
    }
  });

  it('lie under a site exactly when their guard is an act on one', () => {
    for (const route of routes)
      expect(route.path.startsWith('/sites/[siteId]'), route.name).toBe(ACTS.includes(guardOf(route) as never));
  });

  it('ask for what was typed by hand', () => {
    const found = Object.fromEntries(routes.map((route) => [route.name, guardOf(route)]));
    for (const [name, guard] of Object.entries(EXPECTED_GUARDS)) expect([name, found[name]]).toEqual([name, guard]);
  });

  it('name only path parameters the walk can make a row for', async () => {
    const { params } = await fresh();
    const unknown = routes.flatMap((route) =>
      route.params.filter((name) => !(name in params)).map((name) => `${route.name}: ${name}`),
    );
    expect(unknown).toEqual([]);
  });
});

describe.each(routes.map((route) => [route.name, route] as const))('%s', (_, route) => {
  const guard = guardOf(route);

  it('nobody', async () => {
    const { params } = await fresh();
    const { status } = await callRoute(route, params);
    if (guard === 'public') {
      expect([401, 403]).not.toContain(status);
      expect(status).toBeLessThan(500);
    } else {
      expect(status).toBe(401);
    }
  });

  if (guard === 'public' || guard === 'person') {
    it('somebody signed in', async () => {
      const { site, params } = await fresh();
      const { status } = await callRoute(route, params, { cookie: await cookieFor(site.people.viewer) });
      expect([401, 403]).not.toContain(status);
      expect(status).toBeLessThan(500);
    });
    return;
  }

  it('[E 35] a member of another site hears what they would hear of a site that does not exist', async () => {
    const { params } = await fresh();
    const stranger = (await makeSite('Elsewhere')).people.owner;
    const foreign = await callRoute(route, params, { cookie: await cookieFor(stranger) });
    const missing = await callRoute(route, { ...params, siteId: randomUUID() }, { cookie: await cookieFor(stranger) });
    expect(foreign.status).toBe(404);
    expect(missing.status).toBe(404);
    expect(await bodyOf(foreign)).toBe(await bodyOf(missing));
    expect([...foreign.headers]).toEqual([...missing.headers]);
  });

  it.each(ROLES)('%s', async (role) => {
    const { site, params } = await fresh(role);
    const cookie = await cookieFor(site.people[role]);
    const response = await callRoute(route, params, { cookie });
    if (!mayByHand(guard, role)) {
      expect(response.status).toBe(403);
      return;
    }
    const said = `${response.status}: ${await response.clone().text()}`;
    expect([401, 403, 404], said).not.toContain(response.status);
    expect(response.status, said).toBeLessThan(500);
  });

  const other = route.params.filter((name) => name.endsWith('Id') && name !== 'siteId');
  if (other.length > 0) {
    it('ids of another site under my own are not found', async () => {
      const [mine, theirs] = [await fresh(), await fresh()];
      const mixed = { ...mine.params, ...Object.fromEntries(other.map((name) => [name, theirs.params[name] ?? ''])) };
      const cookie = await cookieFor(mine.site.people.owner);
      const response = await callRoute(route, mixed, { cookie });
      // A body that is not complete is refused before the row is looked for; either way nothing is told or changed.
      expect([404, 422]).toContain(response.status);
      if (response.status === 404) {
        const none = Object.fromEntries(other.map((name) => [name, randomUUID()]));
        const missing = await callRoute(
          route,
          { ...mine.params, ...none },
          { cookie: await cookieFor(mine.site.people.owner) },
        );
        expect(await bodyOf(response)).toBe(await bodyOf(missing));
      }
    });
  }
});

describe('[E 24] a GET', () => {
  let backup: postgres.Sql;
  beforeAll(() => {
    backup = postgres(world.urls().backupUrl, { max: 1 });
  });
  afterAll(() => backup.end());

  const dump = async () => {
    const tables = await backup<{ name: string }[]>`
      select relname as name from pg_class where relkind = 'r' and relnamespace = 'public'::regnamespace order by 1`;
    const sums: Record<string, unknown> = {};
    for (const { name } of tables) {
      const [row] =
        await backup`select md5(coalesce(string_agg(t::text, ',' order by t::text), '')) as sum from ${backup(name)} t`;
      sums[name] = row?.sum;
    }
    return sums;
  };

  it.each(routes.filter((route) => route.method === 'GET').map((route) => [route.name, route] as const))(
    '%s leaves every table as it was',
    async (_, route) => {
      const { site, params } = await fresh();
      const cookie = await cookieFor(site.people.owner);
      // A session is prolonged at most every few days, and that is no change a link may be followed for: done beforehand.
      await actorOfCookie(cookieFrom(cookie));
      const before = await dump();
      for (let turn = 0; turn < 3; turn += 1) await callRoute(route, params, { cookie });
      expect(await dump()).toEqual(before);
    },
  );
});
