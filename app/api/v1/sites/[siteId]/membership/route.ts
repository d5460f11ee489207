import { leaveSite } from '@/lib/data/sites/leaveSite';
import { okSchema } from '@/lib/schemas/parts';
import { route } from '../../../_route';

export const DELETE = route({
  verb: leaveSite,
  answer: okSchema,
  summary: 'Leave a site',
});
