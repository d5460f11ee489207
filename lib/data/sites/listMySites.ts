import { nothingSchema } from '@/lib/schemas/parts';
import { openPersonVerb } from '../verb';
import { eachOfMySites } from './eachOfMySites';
import { getSiteSummary } from './getSiteSummary';

export const listMySites = openPersonVerb({
  input: nothingSchema,
  run: async ({ ctx, person }) => {
    const sites = await eachOfMySites(person, (siteId) => getSiteSummary({ ctx, input: { siteId } }));
    return { sites: sites.sort((a, b) => a.name.localeCompare(b.name, 'en')) };
  },
});
