import { declineInvitation } from '@/lib/data/sites/declineInvitation';
import { okSchema } from '@/lib/schemas/parts';
import { route } from '../../../_route';

export const POST = route({
  verb: declineInvitation,
  answer: okSchema,
  summary: 'Decline an invitation',
});
