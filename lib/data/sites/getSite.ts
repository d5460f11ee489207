import { nothingSchema } from '@/lib/schemas/parts';
import { siteVerb } from '../verb';
import { readSite } from './readSite';

export const getSite = siteVerb({
  act: 'site.read',
  input: nothingSchema,
  run: ({ tx, siteId, role }) => readSite(tx, siteId, role),
});
