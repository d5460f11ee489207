import { route } from '@/app/api/v1/_route';
import { setSample } from '@/lib/data/review/setSample';
import { reviewSampleAnswerSchema } from '@/lib/schemas/review';

export const PATCH = route({
  verb: setSample,
  answer: reviewSampleAnswerSchema,
  summary: 'Assign a sample, or leave it out',
});
