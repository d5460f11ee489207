import { connect, type Database } from '@/db/client';
import { env } from '@/lib/env';

const held = globalThis as { loamlineDatabase?: ReturnType<typeof connect> };

/** Kept on globalThis so that a development reload does not open a second pool. */
function connection() {
  held.loamlineDatabase ??= connect(env().DATABASE_URL, { max: env().DATABASE_POOL, applicationName: 'loamline' });
  return held.loamlineDatabase;
}

export const database = (): Database => connection().db;
export const closeDatabase = async (): Promise<void> => {
  await held.loamlineDatabase?.client.end({ timeout: 2 });
  delete held.loamlineDatabase;
};
