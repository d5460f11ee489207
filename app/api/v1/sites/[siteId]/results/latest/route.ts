import { route } from '@/app/api/v1/_route';
import { latestResults } from '@/lib/data/results/latestResults';
import { resultListSchema } from '@/lib/schemas/results';

export const GET = route({
  verb: latestResults,
  answer: resultListSchema,
  summary: 'The newest results of each plot and analyte',
});
