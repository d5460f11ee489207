export const PROBLEMS = {
  invalid: { status: 422, title: 'Something in this request needs a change' },
  'not-signed-in': { status: 401, title: 'Please sign in' },
  forbidden: { status: 403, title: 'Your role on this site does not allow this' },
  'not-found': { status: 404, title: 'Not found' },
  conflict: { status: 409, title: 'Somebody was faster' },
  gone: { status: 410, title: 'This link no longer works' },
  'too-large': { status: 413, title: 'Too large' },
  'wrong-type': { status: 415, title: 'Not a kind of content that is taken here' },
  'too-many': { status: 429, title: 'Too many tries' },
  unavailable: { status: 503, title: 'Not answering right now' },
  internal: { status: 500, title: 'Something went wrong on our side' },
} as const;

export type ProblemCode = keyof typeof PROBLEMS;
export type FieldProblems = Record<string, string>;

type Extras = { fields?: FieldProblems; retryAfterSeconds?: number; reason?: string; current?: unknown };

/** The one error that reaches a person: a stable code and a sentence. Anything else is "internal" and keeps its message to itself. */
export class Problem extends Error {
  readonly code: ProblemCode;
  readonly sentence: string;
  readonly fields: FieldProblems | undefined;
  readonly retryAfterSeconds: number | undefined;
  /** A finer word than the code, for screens that react to it ('unverified', 'stale-version'). */
  readonly reason: string | undefined;
  /** What stands there now, beside what was sent (stale versions). */
  readonly current: unknown;

  constructor(code: ProblemCode, sentence: string, extras: Extras = {}) {
    super(`${code}: ${sentence}`);
    this.name = 'Problem';
    this.code = code;
    this.sentence = sentence;
    this.fields = extras.fields;
    this.retryAfterSeconds = extras.retryAfterSeconds;
    this.reason = extras.reason;
    this.current = extras.current;
  }

  get status(): number {
    return PROBLEMS[this.code].status;
  }
}

export const notFound = () => new Problem('not-found', 'There is nothing here, or it is not yours to see.');
