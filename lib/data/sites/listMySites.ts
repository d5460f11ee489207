import { sql } from 'drizzle-orm';
import { Problem } from '@/lib/errors';
import { nothingSchema } from '@/lib/schemas/parts';
import type { SiteSummary } from '@/lib/schemas/sites';
import { withPeople } from '../transaction';
import { openPersonVerb } from '../verb';
import { getSiteSummary } from './getSiteSummary';

/** The ids come from the one function that may look across sites; each site is then read in a transaction of its own. */
export const listMySites = openPersonVerb({
  input: nothingSchema,
  run: async ({ ctx, person }) => {
    const ids = await withPeople((tx) => tx.execute<{ id: string }>(sql`select sites_of_person(${person.id}) as id`));
    const sites: SiteSummary[] = [];
    for (const { id } of ids) {
      try {
        sites.push(await getSiteSummary({ ctx, input: { siteId: id } }));
      } catch (error) {
        // Left or removed between the two reads: then it is not mine any more.
        if (!(error instanceof Problem && error.code === 'not-found')) throw error;
      }
    }
    return { sites: sites.sort((a, b) => a.name.localeCompare(b.name, 'en')) };
  },
});
