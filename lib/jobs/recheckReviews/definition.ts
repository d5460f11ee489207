import { recheckReviews } from '@/lib/data/learning/recheckReviews';
import { giveUpWith } from '../giveUp';
import type { JobDefinition } from '../job';

export const recheckReviewsJob: JobDefinition<'recheck-reviews'> = {
  name: 'recheck-reviews',
  concurrency: 1,
  handle: async ({ ctx, payload }) => {
    await recheckReviews({ ctx, input: payload });
  },
  giveUp: giveUpWith(
    'recheck-reviews',
    'Open reviews were not held against a newly confirmed report, so some of them may lack a doubt that it raises. Their rows are as they were read.',
  ),
};
