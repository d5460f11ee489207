import { route } from '@/app/api/v1/_route';
import { addSample } from '@/lib/data/review/addSample';
import { reviewSampleAnswerSchema } from '@/lib/schemas/review';

export const POST = route({ verb: addSample, answer: reviewSampleAnswerSchema, summary: 'Add a sample', status: 201 });
