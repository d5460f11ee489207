import { route } from '@/app/api/v1/_route';
import { askCopy } from '@/lib/data/copies/askCopy';
import { copySchema } from '@/lib/schemas/copies';

export const POST = route({
  verb: askCopy,
  answer: copySchema,
  summary: 'Ask for a copy of a page with names and addresses blacked out',
});
