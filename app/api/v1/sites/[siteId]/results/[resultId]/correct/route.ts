import { route } from '@/app/api/v1/_route';
import { correctResult } from '@/lib/data/results/correctResult';
import { resultSchema } from '@/lib/schemas/results';

export const POST = route({
  verb: correctResult,
  answer: resultSchema,
  summary: 'Correct a confirmed result with a reason',
});
