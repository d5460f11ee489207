import { nothingSchema } from '@/lib/schemas/parts';
import type { Today, TodaySite } from '@/lib/schemas/today';
import { dayOf } from '../days';
import { eachOfMySites } from '../sites/eachOfMySites';
import { openPersonVerb } from '../verb';
import { getSiteToday } from './getSiteToday';
import { invitationsForMe } from './invitationsForMe';

/** Sites that ask for something come first, then by name. */
const asks = (one: TodaySite) => one.due.length + one.reports.length;

export const getToday = openPersonVerb({
  input: nothingSchema,
  run: async ({ ctx, person }): Promise<Today> => {
    const sites = await eachOfMySites(person, (siteId) => getSiteToday({ ctx, input: { siteId } }));
    sites.sort((a, b) => Math.sign(asks(b)) - Math.sign(asks(a)) || a.name.localeCompare(b.name, 'en'));
    return {
      today: dayOf(ctx.now, person.timeZone),
      sites,
      invitations: await invitationsForMe(ctx, person),
    };
  },
});
