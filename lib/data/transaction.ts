import { type SQL, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import type { SiteId } from '@/lib/domain/ids';
import { JOBS, type JobName, type JobPayload } from '@/lib/jobs/names';
import { type SendOptions, sendJob } from '@/lib/services/queue/queue';
import { database } from './database';

const RETRIED = new Set(['40001', '40P01']);

function sqlState(error: unknown): string | undefined {
  for (let at: unknown = error; at instanceof Error; at = at.cause) {
    if ('code' in at && typeof at.code === 'string' && /^[0-9A-Z]{5}$/.test(at.code)) return at.code;
  }
  return undefined;
}

/** True for a broken unique key: two people did the same thing at the same time. */
export const isUniqueViolation = (error: unknown) => sqlState(error) === '23505';

async function withRetry<T>(run: () => Promise<T>): Promise<T> {
  for (let attempt = 1; ; attempt += 1) {
    try {
      return await run();
    } catch (error) {
      if (attempt >= 3 || !RETRIED.has(sqlState(error) ?? '')) throw error;
    }
  }
}

/** Local to the transaction, so a pooled connection cannot carry it to the next caller. */
export async function enterSite(tx: Transaction, siteId: SiteId): Promise<void> {
  await tx.execute(sql`select set_config('app.site_id', ${siteId}, true)`);
}

/** One transaction, one site. */
export function withSite<T>(siteId: SiteId, run: (tx: Transaction) => Promise<T>): Promise<T> {
  return withRetry(() =>
    database().transaction(async (tx) => {
      await enterSite(tx, siteId);
      return run(tx);
    }),
  );
}

/** For the tables of people and mail, which belong to no site. */
export const withPeople = <T>(run: (tx: Transaction) => Promise<T>): Promise<T> =>
  withRetry(() => database().transaction(run));

const bound = (value: unknown): unknown => {
  if (value === undefined || value === null) return null;
  if (value instanceof Date) return value.toISOString();
  return typeof value === 'object' ? JSON.stringify(value) : value;
};

/** Turns the `$1` text of a package (queue, limiter) into a bound statement of ours. */
export function statement(text: string, values: unknown[]): SQL {
  const parts = text.split(/\$(\d+)/);
  const chunks = parts.map((part, at) => {
    // Odd places are parameter numbers, even places the package's own constant text.
    if (at % 2 === 1) return sql`${bound(values[Number(part) - 1])}`;
    return constantText(part);
  });
  return sql.join(chunks);
}

const constantText = (text: string): SQL => {
  const strings = Object.assign([text], { raw: [text] });
  return sql(strings as unknown as TemplateStringsArray);
};

export async function enqueue<N extends JobName>(
  tx: Transaction,
  name: N,
  payload: JobPayload<N>,
  options: SendOptions = {},
): Promise<void> {
  await sendJob(
    async (text, values) => ({ rows: [...(await tx.execute(statement(text, values)))] }),
    name,
    JOBS[name].payload.parse(payload),
    options,
  );
}
