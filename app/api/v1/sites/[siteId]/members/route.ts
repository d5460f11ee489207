import { listMembers } from '@/lib/data/sites/listMembers';
import { memberListSchema } from '@/lib/schemas/sites';
import { route } from '../../../_route';

export const GET = route({
  verb: listMembers,
  answer: memberListSchema,
  summary: 'Who is on a site',
});
