import { defineConfig } from 'drizzle-kit';

export default defineConfig({
  dialect: 'postgresql',
  schema: [
    './db/schema/actions.ts',
    './db/schema/batches.ts',
    './db/schema/people.ts',
    './db/schema/reports.ts',
    './db/schema/sheets.ts',
    './db/schema/sites.ts',
    './db/schema/troubles.ts',
  ],
  out: './migrations',
});
