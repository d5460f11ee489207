import { changeRole } from '@/lib/data/sites/changeRole';
import { removeMember } from '@/lib/data/sites/removeMember';
import { okSchema } from '@/lib/schemas/parts';
import { route } from '../../../../_route';

export const PATCH = route({
  verb: changeRole,
  answer: okSchema,
  summary: 'Give a member another role',
});

export const DELETE = route({
  verb: removeMember,
  answer: okSchema,
  summary: 'Remove a member',
});
