/** The body of a refusal (RFC 9457), as every route under /api/v1 answers it. */
export type Problem = {
  type: string;
  title: string;
  status: number;
  code: string;
  detail: string;
  fields?: Record<string, string>;
  /** A finer word than the code, for screens that react to it. */
  reason?: string;
  /** What stands there now, when somebody else was faster. */
  current?: unknown;
  /** Leads to the entry in the log. */
  reference?: string;
};

export type ApiResult<T> = { ok: true; status: number; data: T } | { ok: false; problem: Problem };

export type CallOptions = {
  method?: 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';
  /** A plain value goes as JSON; a FormData or Blob goes as it is. */
  body?: unknown;
  headers?: Record<string, string>;
  signal?: AbortSignal;
  timeoutMs?: number;
};

export const ANSWER_WITHIN_MS = 10_000;
const RETRY_AFTER_MS = [400, 1_200];
const PASSING = new Set([502, 503, 504]);

/**
 * Calls one route of the API and never throws: the answer is the data or a problem with a sentence to show.
 * Only GET is tried again; a write that got no answer may have been saved, and its sentence says so.
 */
export async function callApi<T>(path: string, options: CallOptions = {}): Promise<ApiResult<T>> {
  const method = options.method ?? 'GET';
  for (let attempt = 0; ; attempt += 1) {
    const result = await once<T>(path, method, options);
    const wait = RETRY_AFTER_MS[attempt];
    if (result.ok || method !== 'GET' || wait === undefined || !mayPass(result.problem) || options.signal?.aborted) {
      return result;
    }
    await new Promise((resolve) => setTimeout(resolve, wait));
  }
}

export function apiPath(path: string): string {
  return path.startsWith('/api/') ? path : `/api/v1${path.startsWith('/') ? '' : '/'}${path}`;
}

async function once<T>(path: string, method: string, options: CallOptions): Promise<ApiResult<T>> {
  const clock = new AbortController();
  const timer = setTimeout(() => clock.abort('timed-out'), options.timeoutMs ?? ANSWER_WITHIN_MS);
  const cancel = () => clock.abort('cancelled');
  options.signal?.addEventListener('abort', cancel);
  if (options.signal?.aborted) cancel();
  try {
    const response = await fetch(apiPath(path), {
      ...payload(options.body, options.headers),
      method,
      credentials: 'same-origin',
      cache: 'no-store',
      signal: clock.signal,
    });
    const value = await readBody(response);
    if (!response.ok) return { ok: false, problem: toProblem(value, response.status) };
    if (value === UNREADABLE) return { ok: false, problem: localProblem('unreadable-answer', method) };
    // The routes' answers are typed by the schemas they share with this caller.
    return { ok: true, status: response.status, data: value as T };
  } catch {
    const why = clock.signal.aborted
      ? clock.signal.reason === 'cancelled'
        ? 'cancelled'
        : 'timed-out'
      : 'unreachable';
    return { ok: false, problem: localProblem(why, method, options.timeoutMs) };
  } finally {
    clearTimeout(timer);
    options.signal?.removeEventListener('abort', cancel);
  }
}

function payload(
  body: unknown,
  headers: Record<string, string> = {},
): { headers: Record<string, string>; body?: BodyInit } {
  const base = { accept: 'application/json, application/problem+json', ...headers };
  if (body === undefined) return { headers: base };
  if (body instanceof FormData || body instanceof Blob) return { headers: base, body };
  return { headers: { ...base, 'content-type': 'application/json' }, body: JSON.stringify(body) };
}

const UNREADABLE = Symbol('unreadable');

async function readBody(response: Response): Promise<unknown> {
  if (response.status === 204) return undefined;
  const text = await response.text();
  if (text === '') return undefined;
  try {
    return JSON.parse(text);
  } catch {
    return UNREADABLE;
  }
}

function mayPass(problem: Problem): boolean {
  return problem.code === 'unreachable' || PASSING.has(problem.status);
}

/** Turns whatever a failed answer held into a problem, filling what is missing. */
export function toProblem(value: unknown, status: number): Problem {
  const given = isRecord(value) ? value : {};
  const text = (key: string) => {
    const found = given[key];
    return typeof found === 'string' && found !== '' ? found : undefined;
  };
  const fields = toFields(given.fields);
  return {
    type: text('type') ?? 'about:blank',
    title: text('title') ?? 'Something went wrong',
    status: typeof given.status === 'number' ? given.status : status,
    code: text('code') ?? (status >= 500 ? 'internal' : 'refused'),
    detail: text('detail') ?? 'Loamline could not do this. Nothing you typed is lost; try again in a moment.',
    ...(fields ? { fields } : {}),
    ...(text('reason') ? { reason: String(given.reason) } : {}),
    ...(text('reference') ? { reference: String(given.reference) } : {}),
    ...(given.current === undefined ? {} : { current: given.current }),
  };
}

function toFields(value: unknown): Record<string, string> | undefined {
  if (!isRecord(value)) return undefined;
  const entries = Object.entries(value).flatMap(([name, said]): [string, string][] => {
    const first: unknown = Array.isArray(said) ? said[0] : said;
    return typeof first === 'string' ? [[name, first]] : [];
  });
  return entries.length > 0 ? Object.fromEntries(entries) : undefined;
}

function isRecord(value: unknown): value is Record<string, unknown> {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}

type LocalCode = 'timed-out' | 'unreachable' | 'cancelled' | 'unreadable-answer';

export function localProblem(code: LocalCode, method: string, waitedMs = ANSWER_WITHIN_MS): Problem {
  const reading = method === 'GET';
  const kept = reading
    ? 'What is on the screen may be older than what is saved. Try again when the connection is better.'
    : 'What you entered is still here. It may or may not have been saved: reload the page before sending it again.';
  const said: Record<LocalCode, [string, string]> = {
    'timed-out': ['No answer yet', `Loamline did not answer within ${Math.round(waitedMs / 1000)} seconds. ${kept}`],
    unreachable: [
      'No connection',
      reading
        ? `Loamline could not be reached. ${kept}`
        : 'Loamline could not be reached. What you entered is still here; send it again when you are back on the network.',
    ],
    cancelled: ['Stopped', 'This was stopped before it finished.'],
    'unreadable-answer': ['An answer that could not be read', `Loamline answered with something unexpected. ${kept}`],
  };
  const [title, detail] = said[code];
  return { type: 'about:blank', title, status: 0, code, detail };
}
