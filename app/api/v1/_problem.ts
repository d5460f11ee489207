import { PROBLEMS, Problem } from '@/lib/errors';
import { log } from '@/lib/log';

const CONNECTION_CODES = new Set([
  'CONNECT_TIMEOUT',
  'CONNECTION_CLOSED',
  'CONNECTION_ENDED',
  'ECONNREFUSED',
  'ECONNRESET',
  '57P01',
  '57P03',
  '57014',
  '53300',
]);

/** A character that no text of the database can hold (NUL), in plain text or in JSON. */
const CHARACTER_CODES = new Set(['22021', '22P05']);

function carries(error: unknown, codes: ReadonlySet<string>): boolean {
  for (let at: unknown = error; at instanceof Error; at = at.cause) {
    if ('code' in at && typeof at.code === 'string' && codes.has(at.code)) return true;
  }
  return false;
}

function problemOf(error: unknown): Problem {
  if (error instanceof Problem) return error;
  if (carries(error, CONNECTION_CODES)) {
    const sentence = 'The database is not answering. Nothing was saved; try again in a moment.';
    return new Problem('unavailable', sentence, { retryAfterSeconds: 2 });
  }
  if (carries(error, CHARACTER_CODES)) {
    return new Problem('invalid', 'There is an invisible character in this that cannot be kept. Type the text anew.');
  }
  return new Problem(
    'internal',
    'Something went wrong on our side; nothing was saved. Try again, and if it stays, quote the reference below.',
  );
}

/** RFC 9457. An unknown error never shows its message: the reference id leads to it in the log. */
export function problemResponse(error: unknown, requestId: string): Response {
  const problem = problemOf(error);
  if (problem.code === 'internal' || problem.code === 'unavailable')
    log().error({ requestId, err: error }, 'request failed');
  const headers = new Headers({ 'content-type': 'application/problem+json', 'cache-control': 'no-store' });
  if (problem.retryAfterSeconds !== undefined) headers.set('retry-after', String(problem.retryAfterSeconds));
  const body = {
    type: `urn:loamline:problem:${problem.code}`,
    title: PROBLEMS[problem.code].title,
    status: problem.status,
    code: problem.code,
    detail: problem.sentence,
    ...(problem.reason ? { reason: problem.reason } : {}),
    ...(problem.fields ? { fields: problem.fields } : {}),
    ...(problem.current !== undefined ? { current: problem.current } : {}),
    ...(problem.code === 'internal' ? { reference: requestId } : {}),
  };
  return new Response(JSON.stringify(body), { status: problem.status, headers });
}
