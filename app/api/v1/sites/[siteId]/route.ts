import { getSite } from '@/lib/data/sites/getSite';
import { updateSite } from '@/lib/data/sites/updateSite';
import { siteSchema } from '@/lib/schemas/sites';
import { route } from '../../_route';

export const GET = route({
  verb: getSite,
  answer: siteSchema,
  summary: 'A site and its settings',
});

export const PATCH = route({
  verb: updateSite,
  answer: siteSchema,
  summary: 'Change the settings of a site',
});
