import { recheckReviews } from '@/lib/data/learning/recheckReviews';
import type { JobDefinition } from '../job';

export const recheckReviewsJob: JobDefinition<'recheck-reviews'> = {
  name: 'recheck-reviews',
  concurrency: 1,
  handle: async ({ ctx, payload }) => {
    await recheckReviews({ ctx, input: payload });
  },
};
