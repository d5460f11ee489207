import { route } from '@/app/api/v1/_route';
import { createBatch } from '@/lib/data/batches/createBatch';
import { listBatches } from '@/lib/data/batches/listBatches';
import { batchAnnouncedSchema, batchListSchema } from '@/lib/schemas/batches';

export const GET = route({ verb: listBatches, answer: batchListSchema, summary: 'Batches of files that are not done' });
export const POST = route({
  verb: createBatch,
  answer: batchAnnouncedSchema,
  summary: 'Announce many files at once; each is then sent to uploads with its batchFileId',
  status: 201,
});
