import { drizzle } from 'drizzle-orm/postgres-js';
import postgres from 'postgres';
import * as schema from '@/db/schema';
import { closeDatabase } from '@/lib/data/database';
import { line, verdict } from './measure';

type Captured = { what: string; text: string; values: unknown[] };
type Plan = { 'Node Type': string; 'Relation Name'?: string; Plans?: Plan[] };

const scans = (plan: Plan): string[] => [
  ...(plan['Node Type'] === 'Seq Scan' ? [plan['Relation Name'] ?? '?'] : []),
  ...(plan.Plans ?? []).flatMap(scans),
];

/** Runs verbs with a listening connection and keeps the very statements they send. */
export async function captureQueries(url: string, acts: Record<string, () => Promise<unknown>>): Promise<Captured[]> {
  await closeDatabase();
  const client = postgres(url, { max: 2, onnotice: () => {} });
  const captured: Captured[] = [];
  let what = '';
  const logger = {
    logQuery: (text: string, values: unknown[]) => {
      if (/^select/i.test(text) && !/set_config/.test(text)) captured.push({ what, text, values });
    },
  };
  Object.assign(globalThis, { loamlineDatabase: { db: drizzle(client, { schema, logger }), client } });
  for (const [name, act] of Object.entries(acts)) {
    what = name;
    await act();
  }
  await closeDatabase();
  return captured;
}

/** Asks the planner, as the application's own role inside the site, how it would answer each statement. */
export async function explainAll(url: string, siteId: string, captured: readonly Captured[]): Promise<void> {
  const sql = postgres(url, { max: 1, onnotice: () => {} });
  const seen = new Map<string, { statements: number; scanned: Set<string> }>();
  for (const { what, text, values } of captured) {
    const plan = await sql.begin(async (tx) => {
      await tx`select set_config('app.site_id', ${siteId}, true)`;
      const rows = await tx.unsafe(`explain (format json) ${text}`, values as never[]);
      const answer = rows[0]?.['QUERY PLAN'] as { Plan: Plan }[] | undefined;
      return answer?.[0]?.Plan;
    });
    const row = seen.get(what) ?? { statements: 0, scanned: new Set<string>() };
    row.statements += 1;
    for (const table of plan ? scans(plan) : ['no plan']) row.scanned.add(table);
    seen.set(what, row);
  }
  await sql.end();
  for (const [what, { statements, scanned }] of seen) {
    const clean = !scanned.has('result') && !scanned.has('no plan');
    const rest = [...scanned].filter((table) => table !== 'result');
    line(
      `EXPLAIN ${what} (${statements} statements)`,
      `${clean ? 'no sequential scan of result' : 'SEQUENTIAL SCAN OF RESULT'}${rest.length ? `; small tables scanned: ${rest.join(', ')}` : ''}  ${verdict(clean)}`,
    );
  }
}
