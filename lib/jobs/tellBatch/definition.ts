import { tellBatch } from '@/lib/data/batches/tellBatch';
import { giveUpWith } from '../giveUp';
import type { JobDefinition } from '../job';

export const tellBatchJob: JobDefinition<'tell-batch'> = {
  name: 'tell-batch',
  concurrency: 1,
  handle: ({ ctx, payload }) => tellBatch({ ctx, input: payload }),
  giveUp: giveUpWith(
    'tell-batch',
    'Nobody could be told that a batch of files has been read. The reports are there; they stand in the list of reports.',
  ),
};
