import { route } from '@/app/api/v1/_route';
import { listResults } from '@/lib/data/results/listResults';
import { resultListSchema } from '@/lib/schemas/results';

export const GET = route({ verb: listResults, answer: resultListSchema, summary: 'Confirmed results' });
