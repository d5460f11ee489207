import { randomUUID } from 'node:crypto';
import type { z } from 'zod';
import { makeContext } from '@/lib/data/context';
import type { Verb } from '@/lib/data/verb';
import { readQuery } from './_guard';
import { problemResponse } from './_problem';
import { json, type RouteHandler } from './_route';

/**
 * A door for programs that follow a link of ours (RFC 8058 one-click unsubscribe): cookies are ignored, so there is no
 * session to misuse, and the link's own secret is the proof. The form body of that standard is not needed and not read.
 */
export function doorRoute<S extends z.ZodType, R, A extends z.ZodType>(spec: {
  verb: Verb<S, R, { kind: 'public' }>;
  answer: A;
  summary: string;
}): RouteHandler {
  const handler = async (request: Request): Promise<Response> => {
    const requestId = randomUUID();
    try {
      const ctx = await makeContext({ kind: 'nobody' }, { requestId });
      const input = readQuery(new URL(request.url));
      const call = spec.verb as unknown as (call: { ctx: typeof ctx; input: unknown }) => Promise<R>;
      return json(spec.answer.parse(await call({ ctx, input })));
    } catch (error) {
      return problemResponse(error, requestId);
    }
  };
  const descriptor = {
    summary: spec.summary,
    guard: spec.verb.guard,
    input: spec.verb.schema,
    answer: spec.answer,
    status: 200,
  };
  return Object.assign(handler, { descriptor });
}
