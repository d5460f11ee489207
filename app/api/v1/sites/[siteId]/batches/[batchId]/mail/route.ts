import { route } from '@/app/api/v1/_route';
import { setBatchMail } from '@/lib/data/batches/setBatchMail';
import { batchMailAnswerSchema } from '@/lib/schemas/batches';

export const PUT = route({
  verb: setBatchMail,
  answer: batchMailAnswerSchema,
  summary: 'Choose whether a letter says that your batch is read',
});
