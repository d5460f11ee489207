import { sql } from 'drizzle-orm';
import { Problem } from '@/lib/errors';
import { nothingSchema } from '@/lib/schemas/parts';
import type { Today, TodaySite } from '@/lib/schemas/today';
import { dayOf } from '../days';
import { withPeople } from '../transaction';
import { openPersonVerb } from '../verb';
import { getSiteToday } from './getSiteToday';
import { invitationsForMe } from './invitationsForMe';

/** Sites that ask for something come first, then by name. */
const asks = (one: TodaySite) => one.due.length + one.reports.length;

/** One transaction a site: no query ever sees the rows of two. */
export const getToday = openPersonVerb({
  input: nothingSchema,
  run: async ({ ctx, person }): Promise<Today> => {
    const ids = await withPeople((tx) => tx.execute<{ id: string }>(sql`select sites_of_person(${person.id}) as id`));
    const sites: TodaySite[] = [];
    for (const { id } of ids) {
      try {
        sites.push(await getSiteToday({ ctx, input: { siteId: id } }));
      } catch (error) {
        // Left or removed between the two reads: then it is not mine any more.
        if (!(error instanceof Problem && error.code === 'not-found')) throw error;
      }
    }
    sites.sort((a, b) => Math.sign(asks(b)) - Math.sign(asks(a)) || a.name.localeCompare(b.name, 'en'));
    return {
      today: dayOf(ctx.now, person.timeZone),
      sites,
      invitations: await invitationsForMe(ctx, person),
    };
  },
});
