import { randomUUID } from 'node:crypto';
import type { z } from 'zod';
import type { Ctx } from '@/lib/data/context';
import type { Guard } from '@/lib/data/verb';
import { Problem } from '@/lib/errors';
import { assertSameOrigin, contextOf, joinInput, readQuery } from './_guard';
import { problemResponse } from './_problem';
import { json, type RouteHandler, type RouteParams } from './_route';

/** Boundaries, part headers and the small fields beside the file. */
const FORM_ALLOWANCE = 64 * 1024;

const tooLarge = (largestBytes: number) =>
  new Problem(
    'too-large',
    `This file is larger than the ${Math.round(largestBytes / 1024 / 1024)} MB taken here. Nothing was kept; send it in smaller parts or save it smaller.`,
    { reason: 'too-large' },
  );

/** Counts while it passes, so that a body of any size ends at the limit and not in memory. */
function counted(body: ReadableStream<Uint8Array>, limit: number, tripped: () => void): ReadableStream<Uint8Array> {
  let total = 0;
  return body.pipeThrough(
    new TransformStream<Uint8Array, Uint8Array>({
      transform(chunk, controller) {
        total += chunk.byteLength;
        if (total <= limit) return controller.enqueue(chunk);
        tripped();
        controller.error(new Error('over the limit'));
      },
    }),
  );
}

async function readForm(request: Request, largestBytes: number): Promise<FormData> {
  const type = request.headers.get('content-type') ?? '';
  if (!/^multipart\/form-data\b/i.test(type)) {
    throw new Problem('wrong-type', 'Send the file as multipart/form-data, in a field called file.');
  }
  const limit = largestBytes + FORM_ALLOWANCE;
  if (Number(request.headers.get('content-length') ?? '0') > limit) throw tooLarge(largestBytes);
  if (!request.body) throw new Problem('invalid', 'No file came with this request.', { reason: 'no-file' });
  let over = false;
  const body = counted(request.body, limit, () => {
    over = true;
  });
  try {
    return await new Response(body, { headers: { 'content-type': type } }).formData();
  } catch {
    if (over) throw tooLarge(largestBytes);
    throw new Problem(
      'invalid',
      'The upload broke off before the whole file was here. Nothing was kept; send it again.',
      {
        reason: 'broken-upload',
      },
    );
  }
}

async function partsOf(form: FormData): Promise<Record<string, unknown>> {
  const fields: Record<string, unknown> = {};
  for (const [name, value] of form) {
    if (name in fields || (name === 'file' && 'fileName' in fields)) {
      throw new Problem('invalid', `The field ${name} stands there twice. Send one file at a time.`);
    }
    if (typeof value === 'string') {
      if (name === 'file')
        throw new Problem('invalid', 'The field file holds text, not a file.', { reason: 'no-file' });
      fields[name] = value;
      continue;
    }
    if (name !== 'file') throw new Problem('invalid', `A file came in the field ${name}; send it in the field file.`);
    fields.fileName = value.name;
    fields.bytes = new Uint8Array(await value.arrayBuffer());
  }
  if (!('bytes' in fields)) throw new Problem('invalid', 'No file came with this request.', { reason: 'no-file' });
  return fields;
}

/** The wrapper for files: the same doors as `route`, but the body is one multipart form, read up to a limit. */
export function uploadRoute<R, A extends z.ZodType>(spec: {
  verb: { guard: Guard; schema: z.ZodType } & ((call: never) => Promise<R>);
  answer: A;
  summary: string;
  largestBytes: number;
  status: (result: R) => number;
}): RouteHandler {
  const handler = async (request: Request, { params }: RouteParams): Promise<Response> => {
    const requestId = randomUUID();
    try {
      assertSameOrigin(request);
      const ctx = await contextOf(request, requestId);
      // Nobody signed in: no need to read 20 MB to say so.
      if (ctx.actor.kind !== 'person') throw new Problem('not-signed-in', 'Please sign in to go on.');
      const form = await readForm(request, spec.largestBytes);
      const input = joinInput(readQuery(new URL(request.url)), await partsOf(form), (await params) ?? {});
      const call = spec.verb as unknown as (call: { ctx: Ctx; input: unknown }) => Promise<R>;
      const result = await call({ ctx, input });
      return json(spec.answer.parse(result), spec.status(result));
    } catch (error) {
      return problemResponse(error, requestId);
    }
  };
  const descriptor = {
    summary: spec.summary,
    guard: spec.verb.guard,
    input: spec.verb.schema,
    answer: spec.answer,
    status: 201,
  };
  return Object.assign(handler, { descriptor });
}
