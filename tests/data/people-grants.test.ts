import { describe, expect, it } from 'vitest';
import { useWorld } from '../support/factory';

const world = useWorld();

describe('[E 44] what crosses sites', () => {
  it('may read four tables and write none: the functions’ owner holds no other grant', async () => {
    const rows = await world.owner()<{ table: string; grant: string }[]>`
      select c.relname as table, a.privilege_type as grant
      from pg_class c cross join aclexplode(c.relacl) a join pg_roles r on r.oid = a.grantee
      where r.rolname = 'loamline_lookup' and c.relnamespace = 'public'::regnamespace order by 1, 2`;
    expect(rows.map((row) => `${row.grant} ${row.table}`)).toEqual([
      'SELECT invitation',
      'SELECT membership',
      'SELECT reminder',
      'SELECT report',
    ]);
  });

  it('[E 43] is pinned to its schema and open to the application only', async () => {
    const rows = await world.owner()<{ name: string; open: boolean; app: boolean; config: string[] }[]>`
      select p.proname as name, has_function_privilege('loamline_app', p.oid, 'execute') as app,
        exists (select from aclexplode(p.proacl) a where a.grantee = 0) as open, p.proconfig as config
      from pg_proc p where p.prosecdef and p.pronamespace = 'public'::regnamespace`;
    expect(rows).toHaveLength(5);
    for (const row of rows) {
      expect([row.name, row.app, row.open, row.config]).toEqual([
        row.name,
        true,
        false,
        ['search_path=public, pg_temp'],
      ]);
    }
  });

  it('[E 43] no view shows more than the one who asks may see', async () => {
    const views = await world.owner()<{ name: string; options: string[] | null }[]>`
      select relname as name, reloptions as options from pg_class
      where relkind in ('v', 'm') and relnamespace = 'public'::regnamespace`;
    expect(views.filter((view) => !view.options?.includes('security_invoker=true'))).toEqual([]);
  });

  it('[E 41] the policies of every site table read and check the same setting, and an empty one means no rows', async () => {
    const rows = await world.owner()<{ table: string; using: string; check: string }[]>`
      select tablename as table, qual as using, with_check as check from pg_policies where schemaname = 'public'`;
    expect(rows.length).toBeGreaterThan(15);
    for (const row of rows) {
      expect([row.table, row.using]).toEqual([
        row.table,
        expect.stringMatching(/NULLIF\(current_setting\('app\.site_id'/i),
      ]);
      expect([row.table, row.check]).toEqual([row.table, row.using]);
    }
  });
});
