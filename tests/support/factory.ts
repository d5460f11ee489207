import { randomUUID } from 'node:crypto';
import { eq } from 'drizzle-orm';
import postgres from 'postgres';
import { afterAll, beforeAll } from 'vitest';
import { laboratory, membership, person, plot, report, reportSample, result, sample, session, site } from '@/db/schema';
import type { Role } from '@/lib/access/table';
import { type Ctx, makeContext } from '@/lib/data/context';
import { closeDatabase, database } from '@/lib/data/database';
import { hashSecret } from '@/lib/data/people/secrets';
import { withPeople, withSite } from '@/lib/data/transaction';
import { asPersonId, asPlotId, asSiteId, type PersonId, type PlotId, type SiteId } from '@/lib/domain/ids';
import { createTestDatabase, type TestDatabase } from './database';

export type World = {
  urls: () => TestDatabase;
  owner: () => postgres.Sql;
  moveClock: (seconds: number) => Promise<void>;
};

/** A database of the suite's own, behind the same code the product runs. Call it at the top of a describe or a file. */
export function useWorld(): World {
  let held: TestDatabase | undefined;
  let ownerSql: postgres.Sql | undefined;
  const urls = () => {
    if (!held) throw new Error('The database exists only while the tests of this file run.');
    return held;
  };
  const owner = () => {
    ownerSql ??= postgres(urls().ownerUrl, { max: 1, onnotice: () => {} });
    return ownerSql;
  };
  beforeAll(async () => {
    held = await createTestDatabase();
    process.env.DATABASE_URL = held.appUrl;
    process.env.LOG_LEVEL ??= 'silent';
  });
  afterAll(async () => {
    await ownerSql?.end();
    await closeDatabase();
    await held?.drop();
  });
  return {
    urls,
    owner,
    moveClock: async (seconds) => {
      await owner()`insert into clock_offset (only_row, seconds) values (true, ${seconds})
        on conflict (only_row) do update set seconds = excluded.seconds`;
    },
  };
}

export type TestPerson = { id: PersonId; name: string; email: string };

/** The hash below fits no password: these people are signed in by their session row, not by typing. */
export async function makePerson(over: Partial<typeof person.$inferInsert> = {}): Promise<TestPerson> {
  const tag = randomUUID().slice(0, 8);
  const rows = await withPeople((tx) =>
    tx
      .insert(person)
      .values({
        name: `Grower ${tag}`,
        email: `grower-${tag}@garden.test`,
        passwordHash: '$argon2id$none',
        emailVerifiedAt: new Date(),
        ...over,
      })
      .returning({ id: person.id, name: person.name, email: person.email }),
  );
  const row = rows[0];
  if (!row) throw new Error('The person was not written.');
  return { ...row, id: asPersonId(row.id) };
}

export async function ctxAs(who: TestPerson): Promise<Ctx> {
  const rows = await database().select().from(person).where(eq(person.id, who.id));
  const row = rows[0];
  if (!row) throw new Error('This person does not exist.');
  return makeContext({
    kind: 'person',
    sessionId: 'test-session',
    person: {
      id: who.id,
      name: row.name,
      email: row.email,
      verified: row.emailVerifiedAt !== null,
      units: row.units,
      locale: row.locale,
      paper: row.paper,
      timeZone: row.timeZone,
      mailHour: row.mailHour,
    },
  });
}

export const ctxNobody = (): Promise<Ctx> => makeContext({ kind: 'nobody' });
export const ctxWorker = (): Promise<Ctx> => makeContext({ kind: 'worker' });

/** A cookie header for requests that go through the routes. */
export async function cookieFor(who: TestPerson): Promise<string> {
  const secret = randomUUID() + randomUUID();
  await withPeople((tx) =>
    tx.insert(session).values({
      id: hashSecret(secret),
      userId: who.id,
      expiresAt: new Date(Date.now() + 24 * 3600 * 1000),
    }),
  );
  return `__Host-loamline=${secret}`;
}

export type TestSite = { id: SiteId; people: Record<Role, TestPerson> };

const APRIL_TO_OCTOBER = Array.from({ length: 12 }, (_, month) => month >= 3 && month <= 9);

/** A site with one person of every role. */
export async function makeSite(name = 'Hill Field'): Promise<TestSite> {
  const people: Record<Role, TestPerson> = {
    owner: await makePerson(),
    adviser: await makePerson(),
    helper: await makePerson(),
    viewer: await makePerson(),
  };
  const id = asSiteId(randomUUID());
  await withSite(id, async (tx) => {
    await tx.insert(site).values({ id, name, warmMonths: APRIL_TO_OCTOBER });
    for (const [role, who] of Object.entries(people)) {
      await tx.insert(membership).values({ siteId: id, personId: who.id, role: role as Role });
    }
  });
  return { id, people };
}

export async function makePlot(siteId: SiteId, over: Partial<typeof plot.$inferInsert> = {}): Promise<PlotId> {
  const rows = await withSite(siteId, (tx) =>
    tx
      .insert(plot)
      .values({
        siteId,
        name: `Plot ${randomUUID().slice(0, 6)}`,
        outline: [
          [0, 0],
          [10, 0],
          [10, 6],
          [0, 6],
        ],
        ...over,
      })
      .returning({ id: plot.id }),
  );
  const row = rows[0];
  if (!row) throw new Error('The plot was not written.');
  return asPlotId(row.id);
}

export async function makeLaboratory(siteId: SiteId, name = 'Millbrook Soil Office'): Promise<string> {
  const [row] = await withSite(siteId, (tx) =>
    tx.insert(laboratory).values({ siteId, name }).returning({ id: laboratory.id }),
  );
  if (!row) throw new Error('The laboratory was not written.');
  return row.id;
}

export type TestValue = {
  analyte: string;
  value: string;
  unit: string;
  method?: string | null;
  basis?: 'mass' | 'none';
};

/** A confirmed report of one bag, as a confirmation would have left it. */
export async function makeTest(
  site: TestSite,
  plotId: PlotId,
  takenOn: string,
  values: TestValue[],
  over: { laboratoryId?: string; cores?: number } = {},
): Promise<string[]> {
  const by = site.people.owner.id;
  return withSite(site.id, async (tx) => {
    const siteId = site.id;
    const bag = { siteId, plotId, takenOn, depthFromCm: '0', depthToCm: '15' };
    const [bagRow] = await tx
      .insert(sample)
      .values({ ...bag, cores: over.cores ?? 15 })
      .returning();
    const [reportRow] = await tx
      .insert(report)
      .values({ siteId, origin: 'typed', state: 'confirmed', uploadedBy: by })
      .returning();
    if (!bagRow || !reportRow) throw new Error('The sample or its report was not written.');
    const [line] = await tx
      .insert(reportSample)
      .values({ siteId, reportId: reportRow.id, ordinal: 1, plotId, takenOn, sampleId: bagRow.id })
      .returning();
    if (!line) throw new Error('The sample line was not written.');
    const rows = await tx
      .insert(result)
      .values(
        values.map(({ basis = 'none', method = '1:1_water', ...value }) => ({
          ...bag,
          ...value,
          method,
          unitBasis: basis,
          valueSi: basis === 'mass' ? value.value : null,
          sampleId: bagRow.id,
          reportId: reportRow.id,
          reportSampleId: line.id,
          laboratoryId: over.laboratoryId ?? null,
          qualifier: '=' as const,
          printed: value.value,
          confirmedBy: by,
        })),
      )
      .returning({ id: result.id });
    return rows.map((row) => row.id);
  });
}
