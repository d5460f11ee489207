import { json } from './_route';

/** Sets the session's cookie; on the way out the browser is also told to forget what it kept of the private pages. */
export function withCookie(setCookie: string, { clear = false } = {}): Response {
  return json({ ok: true }, 200, {
    'set-cookie': setCookie,
    ...(clear ? { 'clear-site-data': '"cache", "storage"' } : {}),
  });
}
