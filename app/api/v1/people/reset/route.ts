import { requestReset } from '@/lib/data/people/requestReset';
import { addressAnswer } from '@/lib/schemas/people';
import { route } from '../../_route';

export const POST = route({
  verb: requestReset,
  answer: addressAnswer,
  summary: 'Ask for a link to choose a new password',
  status: 202,
});
