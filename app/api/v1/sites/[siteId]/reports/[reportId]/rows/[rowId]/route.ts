import { route } from '@/app/api/v1/_route';
import { editRow } from '@/lib/data/review/editRow';
import { rowSchema } from '@/lib/schemas/review';

export const PATCH = route({ verb: editRow, answer: rowSchema, summary: 'Edit the cells of a row' });
