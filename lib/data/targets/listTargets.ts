import { nothingSchema } from '@/lib/schemas/parts';
import type { TargetList } from '@/lib/schemas/targets';
import { siteVerb } from '../verb';
import { builtInSets } from './builtInSets';
import { loadOwnSets } from './loadOwnSets';

export const listTargets = siteVerb({
  act: 'site.read',
  input: nothingSchema,
  run: async ({ tx, siteId }): Promise<TargetList> => ({
    builtIn: builtInSets(),
    own: await loadOwnSets(tx, siteId),
  }),
});
