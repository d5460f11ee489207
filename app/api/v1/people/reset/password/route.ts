import { performReset } from '@/lib/data/people/performReset';
import { addressAnswer } from '@/lib/schemas/people';
import { route } from '../../../_route';

export const POST = route({
  verb: performReset,
  answer: addressAnswer,
  summary: 'Choose a new password with the mailed link',
});
