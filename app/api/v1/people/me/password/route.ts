import { changePassword } from '@/lib/data/people/changePassword';
import { okSchema } from '@/lib/schemas/parts';
import { withCookie } from '../../../_cookie';
import { route } from '../../../_route';

export const POST = route({
  verb: changePassword,
  answer: okSchema,
  summary: 'Change the password, knowing the current one',
  extra: (request) => ({ userAgent: request.headers.get('user-agent')?.slice(0, 400) ?? null }),
  respond: (opened) => withCookie(opened.setCookie),
});
