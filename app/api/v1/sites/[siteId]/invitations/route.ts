import { invite } from '@/lib/data/sites/invite';
import { listInvitations } from '@/lib/data/sites/listInvitations';
import { invitationListSchema, invitedSchema } from '@/lib/schemas/sites';
import { route } from '../../../_route';

export const GET = route({
  verb: listInvitations,
  answer: invitationListSchema,
  summary: 'The invitations of a site',
});

export const POST = route({
  verb: invite,
  answer: invitedSchema,
  summary: 'Invite somebody by mail',
  status: 201,
});
