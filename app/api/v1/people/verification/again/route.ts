import { resendVerification } from '@/lib/data/people/resendVerification';
import { addressAnswer } from '@/lib/schemas/people';
import { route } from '../../../_route';

export const POST = route({
  verb: resendVerification,
  answer: addressAnswer,
  summary: 'Ask for another link to confirm an address',
  status: 202,
});
