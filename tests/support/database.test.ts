import postgres from 'postgres';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { createTestDatabase, type TestDatabase } from './database';

let database: TestDatabase;
const open = (url: string) => postgres(url, { max: 1, onnotice: () => undefined });

async function codeOf(answer: Promise<unknown>): Promise<string | undefined> {
  try {
    await answer;
  } catch (error) {
    return error instanceof postgres.PostgresError ? error.code : String(error);
  }
  return undefined;
}

beforeAll(async () => {
  database = await createTestDatabase();
});
afterAll(() => database.drop());

describe('the database roles', () => {
  it('[E 38] are what db/roles.sql says: only lookup and backup pass row-level security, nobody is more than that', async () => {
    const sql = open(database.superuserUrl);
    const roles = await sql`
      select rolname, rolcanlogin, rolbypassrls, rolsuper or rolcreaterole or rolcreatedb or rolreplication as powerful
      from pg_roles where rolname like 'loamline%' order by rolname`;
    await sql.end();
    expect(roles.map((role) => Object.values(role))).toEqual([
      ['loamline_app', true, false, false],
      ['loamline_backup', true, true, false],
      ['loamline_lookup', false, true, false],
      ['loamline_owner', true, false, false],
    ]);
  });

  it('lets the owner hand a function to lookup, and lets app neither create nor become another role', async () => {
    const owner = open(database.ownerUrl);
    const made = await owner.begin(async (sql) => {
      await sql`grant create on schema public to loamline_lookup`;
      await sql`create function roles_probe() returns text language sql security definer set search_path = pg_catalog as 'select current_user::text'`;
      await sql`alter function roles_probe() owner to loamline_lookup`;
      await sql`revoke create on schema public from loamline_lookup`;
      return sql`select roles_probe() as name`;
    });
    await owner.end();
    expect(made[0]?.name).toBe('loamline_lookup');
    const app = open(database.appUrl);
    expect(await codeOf(app`create table t (a int)`)).toBe('42501');
    expect(await codeOf(app`create schema s`)).toBe('42501');
    expect(await codeOf(app`set role loamline_lookup`)).toBe('42501');
    expect(await codeOf(app`set role loamline_owner`)).toBe('42501');
    await app.end();
  });

  it('lets backup read everything and write nothing', async () => {
    const owner = open(database.ownerUrl);
    await owner`create table backup_probe (a int)`;
    await owner`insert into backup_probe values (1)`;
    await owner.end();
    const backup = open(database.backupUrl);
    expect(await backup`select a from backup_probe`).toHaveLength(1);
    expect(await codeOf(backup`insert into backup_probe values (2)`)).toBe('25006');
    await backup`set default_transaction_read_only = off`;
    expect(await codeOf(backup`insert into backup_probe values (2)`)).toBe('42501');
    await backup.end();
  });
});

it('makes databases that know nothing of each other, also at the same time, and takes them away', async () => {
  const [one, two] = await Promise.all([createTestDatabase(), createTestDatabase()]);
  const sql = open(one.ownerUrl);
  await sql`create table only_here (a int)`;
  await sql.end();
  const other = open(two.ownerUrl);
  expect(await codeOf(other`select * from only_here`)).toBe('42P01');
  // Dropping must not wait for connections that a failed test left open.
  await Promise.all([one.drop(), two.drop()]);
  await other.end({ timeout: 1 });
  const superuser = open(database.superuserUrl);
  const left = await superuser`select 1 from pg_database where datname in (${one.name}, ${two.name})`;
  await superuser.end();
  expect(left).toHaveLength(0);
});
