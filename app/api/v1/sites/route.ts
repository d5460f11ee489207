import { createSite } from '@/lib/data/sites/createSite';
import { listMySites } from '@/lib/data/sites/listMySites';
import { acceptedSchema, siteListSchema } from '@/lib/schemas/sites';
import { route } from '../_route';

export const GET = route({
  verb: listMySites,
  answer: siteListSchema,
  summary: 'The sites this person is on',
});

export const POST = route({
  verb: createSite,
  answer: acceptedSchema,
  summary: 'Open a site',
  status: 201,
});
