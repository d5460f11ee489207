import { drizzle } from 'drizzle-orm/postgres-js';
import postgres from 'postgres';
import * as schema from './schema';

export type Database = ReturnType<typeof connect>['db'];
export type Transaction = Parameters<Parameters<Database['transaction']>[0]>[0];

/** Lazy by nature: postgres.js opens a connection at the first query, so a build needs no database. */
export function connect(url: string, options: { max: number; applicationName: string }) {
  const client = postgres(url, {
    max: options.max,
    idle_timeout: 60,
    connect_timeout: 5,
    onnotice: () => {},
    connection: {
      application_name: options.applicationName,
      statement_timeout: 5000,
      idle_in_transaction_session_timeout: 15000,
    },
  });
  return { db: drizzle(client, { schema }), client };
}
