import { existsSync } from 'node:fs';
import { writeFile } from 'node:fs/promises';
import path from 'node:path';
import { closeDatabase } from '@/lib/data/database';
import { env } from '@/lib/env';
import { makeDemo } from './seed/makeDemo';

/*
 * The demo: an invented society of growers who show onions, leeks and marrows. `node --import tsx db/seed.ts ACCOUNTS.json`,
 * called by the start script alone, which prints the sign-ins it finds in that file.
 *
 * It goes only into a database that the start script has made and that is empty: the script leaves the file
 * `demo-in-making` beside ACCOUNTS.json while it lasts, and its database listens on this machine only. Where anybody has an
 * account nothing is added.
 *
 * Everything is done by the verbs, as people would do it, on the day on which they did it; the reports of
 * fixtures/reports/demo are read by the program's own reader. Sloe Bank: three plots, one treated with sulfur in 2024 (as
 * intended) and again in 2026 (waiting), two left alone as its controls; two bags of the treated plot each round; one round
 * sent in as page and as data file; a scan nobody can read; a review that waits, with a lost decimal point. Cinder Lane:
 * limed, short of what was meant. Weir Cottage: a small step that cannot be told from noise, a change of laboratory, a
 * reminder that is due. An adviser sees all three; a helper and a viewer the first.
 */
const MARKER = 'demo-in-making';

/** Why this must not go on, or null. */
export function objection(accountsFile: string | undefined, databaseUrl: string): string | null {
  if (accountsFile === undefined) return 'Name the file for the accounts: db/seed.ts ACCOUNTS.json';
  const { hostname } = new URL(databaseUrl);
  const madeHere = hostname === '127.0.0.1' && existsSync(path.join(path.dirname(accountsFile), MARKER));
  return madeHere
    ? null
    : 'The demo goes only into a database that the start script has just made. Nothing was written.';
}

async function main(accountsFile: string | undefined): Promise<number> {
  const refused = objection(accountsFile, env().DATABASE_URL);
  if (refused !== null || accountsFile === undefined) {
    console.error(refused);
    return 1;
  }
  const demo = await makeDemo();
  if (!demo.made) {
    console.log('There are people in this database already: nothing was added.');
    return 0;
  }
  await writeFile(accountsFile, `${JSON.stringify(demo.accounts, null, 1)}\n`, { mode: 0o600 });
  return 0;
}

if (process.argv[1] === import.meta.filename) {
  const code = await main(process.argv[2]).finally(closeDatabase);
  process.exit(code);
}
