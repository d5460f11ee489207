import { route } from '@/app/api/v1/_route';
import { listBatchSamples } from '@/lib/data/batches/listBatchSamples';
import { batchSamplesSchema } from '@/lib/schemas/batches';

export const GET = route({
  verb: listBatchSamples,
  answer: batchSamplesSchema,
  summary: 'Every sample of a batch that waits for review, with a plot that would fit',
});
