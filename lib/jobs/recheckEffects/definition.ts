import { recheckEffects } from '@/lib/data/effects/recheckEffects';
import { giveUpWith } from '../giveUp';
import type { JobDefinition } from '../job';

export const recheckEffectsJob: JobDefinition<'recheck-effects'> = {
  name: 'recheck-effects',
  concurrency: 1,
  handle: async ({ ctx, payload }) => {
    await recheckEffects({ ctx, input: payload });
  },
  giveUp: giveUpWith(
    'recheck-effects',
    'The effect checks were not gone over after results changed, so the first page may not name a new verdict. Every page of a plot works its checks out afresh and is right.',
  ),
};
