import { recheckEffects } from '@/lib/data/effects/recheckEffects';
import type { JobDefinition } from '../job';

export const recheckEffectsJob: JobDefinition<'recheck-effects'> = {
  name: 'recheck-effects',
  concurrency: 1,
  handle: async ({ ctx, payload }) => {
    await recheckEffects({ ctx, input: payload });
  },
};
