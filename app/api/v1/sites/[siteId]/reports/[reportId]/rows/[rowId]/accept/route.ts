import { route } from '@/app/api/v1/_route';
import { acceptRow } from '@/lib/data/review/acceptRow';
import { rowSchema } from '@/lib/schemas/review';

export const POST = route({ verb: acceptRow, answer: rowSchema, summary: 'Say that a doubtful row is right' });
