import { signUp } from '@/lib/data/people/signUp';
import { signUpAnswer } from '@/lib/schemas/people';
import { route } from '../_route';

export const POST = route({
  verb: signUp,
  answer: signUpAnswer,
  summary: 'Sign up; the address is confirmed by mail',
  status: 202,
});
