import { signIn } from '@/lib/data/people/signIn';
import { signOut } from '@/lib/data/people/signOut';
import { okSchema } from '@/lib/schemas/parts';
import { withCookie } from '../_cookie';
import { route } from '../_route';

export const POST = route({
  verb: signIn,
  answer: okSchema,
  summary: 'Sign in',
  extra: (request) => ({ userAgent: request.headers.get('user-agent')?.slice(0, 400) ?? null }),
  respond: (opened) => withCookie(opened.setCookie),
});

export const DELETE = route({
  verb: signOut,
  answer: okSchema,
  summary: 'Sign out',
  respond: (closed) => withCookie(closed.setCookie, { clear: true }),
});
