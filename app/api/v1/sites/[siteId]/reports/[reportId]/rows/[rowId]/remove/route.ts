import { route } from '@/app/api/v1/_route';
import { removeRow } from '@/lib/data/review/removeRow';
import { rowSchema } from '@/lib/schemas/review';

export const POST = route({ verb: removeRow, answer: rowSchema, summary: 'Remove a row from the review' });
