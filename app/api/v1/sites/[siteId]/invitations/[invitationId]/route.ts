import { revokeInvitation } from '@/lib/data/sites/revokeInvitation';
import { okSchema } from '@/lib/schemas/parts';
import { route } from '../../../../_route';

export const DELETE = route({
  verb: revokeInvitation,
  answer: okSchema,
  summary: 'Take an invitation back',
});
