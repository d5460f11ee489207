import { nothingSchema } from '@/lib/schemas/parts';
import { siteVerb } from '../verb';
import { loadLaboratories } from './loadLaboratories';

export const listLaboratories = siteVerb({
  act: 'site.read',
  input: nothingSchema,
  run: async ({ tx, siteId }) => ({ laboratories: await loadLaboratories(tx, siteId) }),
});
