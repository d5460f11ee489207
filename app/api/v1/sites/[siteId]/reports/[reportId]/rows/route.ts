import { route } from '@/app/api/v1/_route';
import { addRow } from '@/lib/data/review/addRow';
import { editRows } from '@/lib/data/review/editRows';
import { rowOutcomesSchema, rowSchema } from '@/lib/schemas/review';

export const POST = route({ verb: addRow, answer: rowSchema, summary: 'Add a row', status: 201 });
export const PATCH = route({
  verb: editRows,
  answer: rowOutcomesSchema,
  summary: 'Edit many rows at once, each with its own version',
});
