import { route } from '@/app/api/v1/_route';
import { restoreRow } from '@/lib/data/review/restoreRow';
import { rowSchema } from '@/lib/schemas/review';

export const POST = route({ verb: restoreRow, answer: rowSchema, summary: 'Bring a removed row back' });
