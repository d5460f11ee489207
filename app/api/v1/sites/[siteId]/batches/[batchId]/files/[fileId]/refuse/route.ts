import { route } from '@/app/api/v1/_route';
import { refuseFile } from '@/lib/data/batches/refuseFile';
import { batchFileAnswerSchema } from '@/lib/schemas/batches';

export const POST = route({
  verb: refuseFile,
  answer: batchFileAnswerSchema,
  summary: 'Note why a file of a batch was not taken',
});
