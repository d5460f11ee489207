import { route } from '@/app/api/v1/_route';
import { leaveOut } from '@/lib/data/batches/leaveOut';
import { leaveOutAnswerSchema } from '@/lib/schemas/batches';

export const POST = route({
  verb: leaveOut,
  answer: leaveOutAnswerSchema,
  summary: 'Go on without the files that never came',
});
