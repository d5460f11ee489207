import { type Ctx, makeContext } from '@/lib/data/context';
import { actorOfCookie, cookieFrom } from '@/lib/data/people/session';
import { env } from '@/lib/env';
import { Problem } from '@/lib/errors';

/** A request that changes something and carries our cookie must come from our own pages. */
export function assertSameOrigin(request: Request): void {
  if (request.method === 'GET' || request.method === 'HEAD') return;
  const site = request.headers.get('sec-fetch-site');
  if (site === 'same-origin' || site === 'none') return;
  const origin = request.headers.get('origin');
  if (site === null && origin === env().APP_ORIGIN) return;
  throw new Problem('forbidden', 'This request did not come from a page of Loamline, so nothing was changed.', {
    reason: 'cross-site',
  });
}

/** The caller's address: forwarded headers count only for as many proxies as the settings name. */
function addressOf(request: Request): string {
  const hops = env().TRUSTED_PROXIES;
  if (hops === 0) return 'direct';
  const chain = (request.headers.get('x-forwarded-for') ?? '').split(',').map((part) => part.trim());
  return chain.at(-hops) ?? 'direct';
}

export async function contextOf(request: Request, requestId: string): Promise<Ctx> {
  const cookie = cookieFrom(request.headers.get('cookie'));
  if (request.headers.has('authorization')) {
    if (cookie) throw new Problem('invalid', 'Send either a session cookie or a token, not both.');
    throw new Problem('not-signed-in', 'This token is not known here.');
  }
  return makeContext(await actorOfCookie(cookie), { ip: addressOf(request), requestId });
}

export async function readJson(request: Request, limitBytes: number): Promise<unknown> {
  if (request.method === 'GET' || request.method === 'HEAD') return {};
  if (!request.body) return {};
  const length = Number(request.headers.get('content-length') ?? '0');
  if (length > limitBytes)
    throw new Problem('too-large', `This is larger than the ${limitBytes / 1024} KiB taken here.`);
  const isJson = /^application\/json\b/i.test(request.headers.get('content-type') ?? '');
  const chunks: Uint8Array[] = [];
  let total = 0;
  for await (const chunk of request.body as unknown as AsyncIterable<Uint8Array>) {
    total += chunk.byteLength;
    // Only JSON makes a browser ask first whether another site may send this; an empty body needs no type.
    if (!isJson && total > 0) throw new Problem('wrong-type', 'Send the body as application/json.');
    if (total > limitBytes)
      throw new Problem('too-large', `This is larger than the ${limitBytes / 1024} KiB taken here.`);
    chunks.push(chunk);
  }
  if (total === 0) return {};
  try {
    return JSON.parse(Buffer.concat(chunks).toString('utf8'));
  } catch {
    throw new Problem('invalid', 'The body is not valid JSON.');
  }
}

/** Each name once: a repeated query parameter is refused rather than guessed at. */
export function readQuery(url: URL): Record<string, string> {
  const seen = new Map<string, string>();
  for (const [name, value] of url.searchParams) {
    if (seen.has(name)) throw new Problem('invalid', `The parameter ${name} stands there twice.`);
    seen.set(name, value);
  }
  return Object.fromEntries(seen);
}

/** Path, query and body beside each other: a name that stands in two of them is refused, since a reader would have to guess. */
export function joinInput(...parts: readonly Record<string, unknown>[]): Record<string, unknown> {
  const names = parts.flatMap((part) => Object.keys(part));
  const twice = names.find((name, at) => names.indexOf(name) !== at);
  if (twice !== undefined) throw new Problem('invalid', `The parameter ${twice} stands there twice.`);
  return Object.assign({}, ...parts);
}
