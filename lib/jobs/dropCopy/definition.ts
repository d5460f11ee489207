import { dropCopy } from '@/lib/data/copies/throwAwayCopy';
import { giveUpWith } from '../giveUp';
import type { JobDefinition } from '../job';

export const dropCopyJob: JobDefinition<'drop-copy'> = {
  name: 'drop-copy',
  concurrency: 1,
  handle: ({ ctx, payload }) => dropCopy({ ctx, input: payload }),
  giveUp: giveUpWith(
    'drop-copy',
    'A copy of a page without names could not be cleared away: the file store did not answer. It is shown to nobody.',
  ),
};
