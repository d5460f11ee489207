import { route } from '@/app/api/v1/_route';
import { confirmReport } from '@/lib/data/results/confirmReport';
import { confirmAnswerSchema } from '@/lib/schemas/review';

export const POST = route({
  verb: confirmReport,
  answer: confirmAnswerSchema,
  summary: 'Confirm a review: all its results or none',
});
