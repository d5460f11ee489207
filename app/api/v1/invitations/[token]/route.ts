import { lookAtInvitation } from '@/lib/data/sites/lookAtInvitation';
import { invitationLookSchema } from '@/lib/schemas/sites';
import { route } from '../../_route';

export const GET = route({
  verb: lookAtInvitation,
  answer: invitationLookSchema,
  summary: 'What an invitation offers',
});
