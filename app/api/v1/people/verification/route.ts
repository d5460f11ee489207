import { verifyAddress } from '@/lib/data/people/verifyAddress';
import { verifiedAnswer } from '@/lib/schemas/people';
import { route } from '../../_route';

export const POST = route({
  verb: verifyAddress,
  answer: verifiedAnswer,
  summary: 'Confirm an address with the mailed link',
});
