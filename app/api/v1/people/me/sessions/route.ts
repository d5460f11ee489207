import { signOutEverywhere } from '@/lib/data/people/signOutEverywhere';
import { okSchema } from '@/lib/schemas/parts';
import { withCookie } from '../../../_cookie';
import { route } from '../../../_route';

export const DELETE = route({
  verb: signOutEverywhere,
  answer: okSchema,
  summary: 'Sign out on every device',
  respond: (closed) => withCookie(closed.setCookie, { clear: true }),
});
