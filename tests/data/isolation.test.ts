import { readdir, readFile } from 'node:fs/promises';
import { sql } from 'drizzle-orm';
import postgres from 'postgres';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { connect } from '@/db/client';
import { plot } from '@/db/schema';
import { database } from '@/lib/data/database';
import { enterSite, withSite } from '@/lib/data/transaction';
import { makePlot, makeSite, type TestSite, useWorld } from '../support/factory';

const world = useWorld();

const codeOf = async (work: Promise<unknown>): Promise<string | undefined> => {
  try {
    await work;
  } catch (error) {
    for (let at: unknown = error; at instanceof Error; at = at.cause) if ('code' in at) return String(at.code);
    return 'no code';
  }
  return undefined;
};

describe('isolation of sites', () => {
  let one: TestSite;
  let two: TestSite;

  beforeAll(async () => {
    one = await makeSite('First');
    two = await makeSite('Second');
    await makePlot(one.id, { name: 'Only here' });
    await makePlot(two.id, { name: 'Only there' });
  });

  it('[E 37] is enabled and forced on every table that carries a site', async () => {
    const rows = await world.owner()<{ relname: string; relrowsecurity: boolean; relforcerowsecurity: boolean }[]>`
      select c.relname, c.relrowsecurity, c.relforcerowsecurity
      from pg_class c join pg_attribute a on a.attrelid = c.oid
      where c.relkind = 'r' and c.relnamespace = 'public'::regnamespace and a.attname = 'site_id' and not a.attisdropped`;
    expect(rows.length).toBeGreaterThan(15);
    expect(rows.filter((row) => !row.relrowsecurity || !row.relforcerowsecurity)).toEqual([]);
    const [site] =
      await world.owner()`select relrowsecurity and relforcerowsecurity as held from pg_class where relname = 'site'`;
    expect(site?.held).toBe(true);
  });

  it('[E 42] puts the site first in every primary key, and lets foreign keys cross no site', async () => {
    const keys = await world.owner()<{ table: string; columns: string[] }[]>`
      select c.conrelid::regclass::text as table, array_agg(a.attname order by k.ord)::text[] as columns
      from pg_constraint c cross join unnest(c.conkey) with ordinality k(attnum, ord)
      join pg_attribute a on a.attrelid = c.conrelid and a.attnum = k.attnum
      where c.contype = 'p' and c.connamespace = 'public'::regnamespace
        and exists (select from pg_attribute s where s.attrelid = c.conrelid and s.attname = 'site_id')
      group by 1, c.oid`;
    expect(keys.length).toBeGreaterThan(15);
    expect(keys.filter((key) => key.columns[0] !== 'site_id')).toEqual([]);
    const single = await world.owner()`
      select c.conname from pg_constraint c
      where c.contype = 'f' and array_length(c.conkey, 1) = 1
        and exists (select from pg_attribute s where s.attrelid = c.confrelid and s.attname = 'site_id')`;
    expect(single).toEqual([]);
  });

  it('[E 41] shows nothing without a site, and only its own rows with one', async () => {
    expect(await database().select().from(plot)).toEqual([]);
    const names = await withSite(one.id, (tx) => tx.select({ name: plot.name }).from(plot));
    expect(names).toEqual([{ name: 'Only here' }]);
  });

  it('[E 42] refuses to write a row of another site and to point at one', async () => {
    const foreign = await makePlot(two.id);
    const insertThere = withSite(one.id, (tx) =>
      tx.insert(plot).values({ siteId: two.id, name: 'Planted', outline: [] }),
    );
    expect(await codeOf(insertThere)).toBe('42501');
    const pointThere = withSite(one.id, (tx) =>
      tx.execute(
        sql`insert into planting (site_id, plot_id, year, crop) values (${one.id}, ${foreign}, 2026, 'onion')`,
      ),
    );
    expect(await codeOf(pointThere)).toBe('23503');
  });

  it('[E 39] holds for 2,000 interleaved transactions on 4 connections', async () => {
    const pool = connect(world.urls().appUrl, { max: 4, applicationName: 'stress' });
    const sites = [one, two];
    let wrong = 0;
    let seen = 0;
    await Promise.all(
      Array.from({ length: 2000 }, async (_, turn) => {
        const mine = sites[turn % 2] as TestSite;
        await pool.db.transaction(async (tx) => {
          await tx.execute(sql`select set_config('app.site_id', ${mine.id}, true)`);
          const rows = await tx.select({ siteId: plot.siteId }).from(plot);
          seen += rows.length;
          wrong += rows.filter((row) => row.siteId !== mine.id).length;
        });
        if (turn % 10 === 0) wrong += (await pool.db.select().from(plot)).length;
      }),
    );
    await pool.client.end();
    expect(seen).toBeGreaterThan(2000);
    expect(wrong).toBe(0);
  });
});

describe('[E 40] the site of a connection', () => {
  it('is set in one place of the program, and only until the transaction ends', async () => {
    const files: string[] = [];
    for (const room of ['app', 'lib', 'db']) {
      const found = await readdir(room, { recursive: true });
      files.push(...found.filter((file) => /\.tsx?$/.test(file)).map((file) => `${room}/${file}`));
    }
    expect(files.length).toBeGreaterThan(300);
    const setting: string[] = [];
    for (const file of files) {
      const text = await readFile(file, 'utf8');
      if (/set_config|\bset\s+(session|local)\b|`\s*set\s+\w|set\s+app\./i.test(text)) setting.push(file);
    }
    expect(setting).toEqual(['lib/data/transaction.ts']);
    const calls = (await readFile('lib/data/transaction.ts', 'utf8')).match(/set_config\([^)]*\)/g) ?? [];
    expect(calls).toHaveLength(1);
    expect(calls[0]).toMatch(/^set_config\('app\.site_id', .*, true\)$/);
  });

  it('does not stay behind for the next caller of that connection', async () => {
    const pool = connect(world.urls().appUrl, { max: 1, applicationName: 'one-connection' });
    const site = await makeSite('Third');
    const setting = async () => [...(await pool.db.execute(sql`select current_setting('app.site_id', true) as id`))];
    await pool.db.transaction(async (tx) => {
      await enterSite(tx, site.id);
      expect(await tx.select().from(plot)).toEqual([]);
    });
    expect(await setting()).toEqual([{ id: '' }]);
    await pool.client.end();
  });
});

describe('database roles', () => {
  let app: postgres.Sql;
  beforeAll(() => {
    app = postgres(world.urls().appUrl, { max: 1 });
  });
  afterAll(() => app.end());

  it('[E 38] the application may not bypass, define, truncate, or rewrite what is written once', async () => {
    const [role] = await app`select rolbypassrls, rolsuper, rolcreatedb from pg_roles where rolname = current_user`;
    expect(role).toEqual({ rolbypassrls: false, rolsuper: false, rolcreatedb: false });
    expect(await codeOf(app`truncate plot`)).toBe('42501');
    expect(await codeOf(app`create table public.planted (id int)`)).toBe('42501');
    expect(await codeOf(app`update audit_event set act = 'x'`)).toBe('42501');
    expect(await codeOf(app`delete from audit_event`)).toBe('42501');
    expect(await codeOf(app`delete from result`)).toBe('42501');
    expect(await codeOf(app`update result set value = 1`)).toBe('42501');
    expect(await codeOf(app`insert into clock_offset (seconds) values (5)`)).toBe('42501');
  });

  it('[E 43] exactly five functions cross sites, each pinned and owned by lookup, and lookup cannot log in', async () => {
    const rows = await world.owner()<{ name: string; owner: string; config: string[] }[]>`
      select p.proname as name, r.rolname as owner, p.proconfig as config
      from pg_proc p join pg_roles r on r.oid = p.proowner
      where p.pronamespace = 'public'::regnamespace and p.prosecdef order by 1`;
    expect(rows.map((row) => row.name)).toEqual([
      'due_reminders',
      'site_of_mail',
      'site_of_token',
      'sites_of_person',
      'stale_uploads',
    ]);
    for (const row of rows) {
      expect(row.owner).toBe('loamline_lookup');
      expect(row.config).toEqual(['search_path=public, pg_temp']);
    }
    const [lookup] =
      await world.owner()`select rolcanlogin, rolbypassrls from pg_roles where rolname = 'loamline_lookup'`;
    expect(lookup).toEqual({ rolcanlogin: false, rolbypassrls: true });
  });

  it('the owner, too, sees no rows without a site; the backup role sees all and writes none', async () => {
    const mine = await makeSite('Kept');
    expect(await world.owner()`select id from site where id = ${mine.id}`).toEqual([]);
    const backup = postgres(world.urls().backupUrl, { max: 1 });
    expect(await backup`select id from site where id = ${mine.id}`).toEqual([{ id: mine.id }]);
    expect(await codeOf(backup`update site set name = 'x'`)).toBe('25006');
    await backup.end();
  });

  it('[E 44] sites_of_person crosses sites and returns ids only', async () => {
    const mine = await makeSite('Mine');
    const rows = await app`select sites_of_person(${mine.people.viewer.id}) as id`;
    expect(rows.map((row) => row.id)).toEqual([mine.id]);
  });
});
