import { route } from '@/app/api/v1/_route';
import { getReview } from '@/lib/data/review/getReview';
import { reviewSchema } from '@/lib/schemas/review';

export const GET = route({ verb: getReview, answer: reviewSchema, summary: 'Everything the review of a report shows' });
