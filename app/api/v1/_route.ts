import { randomUUID } from 'node:crypto';
import type { z } from 'zod';
import type { Ctx } from '@/lib/data/context';
import type { Guard } from '@/lib/data/verb';
import { Problem } from '@/lib/errors';
import { assertSameOrigin, contextOf, joinInput, readJson, readQuery } from './_guard';
import { problemResponse } from './_problem';

/** A route without a parameter in its path is handed no params at all. */
export type RouteParams = { params: Promise<Record<string, string> | undefined> };
type Descriptor = {
  summary: string;
  guard: Guard;
  input: z.ZodType;
  answer: z.ZodType;
  status: number;
};
export type RouteHandler = ((request: Request, params: RouteParams) => Promise<Response>) & { descriptor: Descriptor };

/** A verb of any guard: the wrapper hands it whatever came in, and the verb's own schema decides. */
type AnyVerb<R> = { guard: Guard; schema: z.ZodType } & ((call: never) => Promise<R>);

type Spec<R, A extends z.ZodType> = {
  verb: AnyVerb<R>;
  answer: A;
  summary: string;
  status?: number;
  /** Server-side facts a verb needs that no client may send (the browser's name). */
  extra?: (request: Request) => Record<string, unknown>;
  /** For answers that are not plain JSON: a cookie to set, a file to stream. */
  respond?: (result: R, ctx: Ctx) => Response | Promise<Response>;
};

/** The one wrapper: same origin, session, input, verb, typed answer or problem+json. */
export function route<R, A extends z.ZodType>(spec: Spec<R, A>): RouteHandler {
  const handler = async (request: Request, { params }: RouteParams): Promise<Response> => {
    const requestId = randomUUID();
    try {
      assertSameOrigin(request);
      const ctx = await contextOf(request, requestId);
      const body = await readJson(request, 1024 * 1024);
      if (typeof body !== 'object' || body === null || Array.isArray(body)) {
        throw new Problem('invalid', 'The body must be a JSON object.');
      }
      const input = {
        ...joinInput(readQuery(new URL(request.url)), { ...body }, (await params) ?? {}),
        ...spec.extra?.(request),
      };
      const call = spec.verb as unknown as (call: { ctx: Ctx; input: unknown }) => Promise<R>;
      const result = await call({ ctx, input });
      if (spec.respond) return await spec.respond(result, ctx);
      return json(spec.answer.parse(result), spec.status ?? 200);
    } catch (error) {
      return problemResponse(error, requestId);
    }
  };
  const descriptor: Descriptor = {
    summary: spec.summary,
    guard: spec.verb.guard,
    input: spec.verb.schema,
    answer: spec.answer,
    status: spec.status ?? 200,
  };
  return Object.assign(handler, { descriptor });
}

export function json(value: unknown, status = 200, headers: Record<string, string> = {}): Response {
  return new Response(JSON.stringify(value), {
    status,
    headers: {
      'content-type': 'application/json',
      'cache-control': 'no-store',
      'x-content-type-options': 'nosniff',
      'content-security-policy': "default-src 'none'; frame-ancestors 'none'",
      ...headers,
    },
  });
}
