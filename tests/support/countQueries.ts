import { drizzle } from 'drizzle-orm/postgres-js';
import postgres from 'postgres';
import * as schema from '@/db/schema';
import { closeDatabase } from '@/lib/data/database';

/** Puts a listening connection in place of the program's own: answers how many statements a piece of work sends. */
export async function countingConnection(url: string): Promise<(work: () => Promise<unknown>) => Promise<number>> {
  await closeDatabase();
  const client = postgres(url, { max: 2, onnotice: () => {} });
  let sent = 0;
  const logger = {
    logQuery: () => {
      sent += 1;
    },
  };
  Object.assign(globalThis, { loamlineDatabase: { db: drizzle(client, { schema, logger }), client } });
  return async (work) => {
    sent = 0;
    await work();
    return sent;
  };
}
