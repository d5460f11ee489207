import { route } from '@/app/api/v1/_route';
import { setSameAs } from '@/lib/data/review/setSameAs';
import { reviewSampleAnswerSchema } from '@/lib/schemas/review';

export const PUT = route({
  verb: setSameAs,
  answer: reviewSampleAnswerSchema,
  summary: 'Say that a sample is another form of an analysis',
});
