import { acceptInvitation } from '@/lib/data/sites/acceptInvitation';
import { acceptedSchema } from '@/lib/schemas/sites';
import { route } from '../../../_route';

export const POST = route({
  verb: acceptInvitation,
  answer: acceptedSchema,
  summary: 'Accept an invitation',
});
