import { and, eq } from 'drizzle-orm';
import { z } from 'zod';
import type { Transaction } from '@/db/client';
import { membership } from '@/db/schema';
import { type Act, can, type Role } from '@/lib/access/table';
import { asSiteId, type SiteId } from '@/lib/domain/ids';
import { notFound, Problem } from '@/lib/errors';
import { type AuditEntry, audit } from './audit';
import type { Ctx, SignedIn } from './context';
import { withPeople, withSite } from './transaction';

export type Guard = { kind: 'site'; act: Act } | { kind: 'person' } | { kind: 'public' } | { kind: 'worker' };

/** zod gives an object without fields a type that allows no field at all, not even the site's id beside it. */
type Fields<S extends z.ZodType> = z.input<S> extends Record<string, never> ? object : z.input<S>;

/** A verb is called as `verb({ ctx, input })` and carries its guard and schema, so that routes, the API description and the matrix test read them. */
export type Verb<S extends z.ZodType, R, G extends Guard = Guard> = ((call: {
  ctx: Ctx;
  input: G extends { kind: 'site' } ? { siteId: string } & Fields<S> : Fields<S>;
}) => Promise<R>) & { guard: G; schema: S };

export function parse<S extends z.ZodType>(schema: S, input: unknown): z.output<S> {
  const parsed = schema.safeParse(input);
  if (parsed.success) return parsed.data;
  const fields: Record<string, string> = {};
  for (const issue of parsed.error.issues) fields[issue.path.join('.') || 'form'] ??= issue.message;
  throw new Problem('invalid', 'Some fields need a change; nothing was saved yet.', { fields });
}

export function signedIn(ctx: Ctx): SignedIn {
  if (ctx.actor.kind !== 'person') throw new Problem('not-signed-in', 'Please sign in to go on.');
  return ctx.actor.person;
}

export function siteIdOf(input: unknown): SiteId {
  const id = z.object({ siteId: z.uuid() }).safeParse(input);
  if (!id.success) throw notFound();
  return asSiteId(id.data.siteId);
}

/** Beat one of every verb on a site: a stranger is told "not found", a member without the right "forbidden". */
export async function mayHere(tx: Transaction, ctx: Ctx, siteId: SiteId, act: Act): Promise<Role> {
  const person = signedIn(ctx);
  const rows = await tx
    .select({ role: membership.role })
    .from(membership)
    .where(and(eq(membership.siteId, siteId), eq(membership.personId, person.id)))
    .limit(1);
  const role = rows[0]?.role;
  if (!role) throw notFound();
  if (!can(role, act)) {
    throw new Problem('forbidden', `As ${role} on this site you cannot do this. An owner of the site can.`);
  }
  return role;
}

export type SiteTools<I> = {
  ctx: Ctx;
  tx: Transaction;
  siteId: SiteId;
  role: Role;
  person: SignedIn;
  input: I;
  audit: (entry: AuditEntry) => Promise<void>;
};

/** May this person do this act here; parse; transaction; the change itself; audit. `run` holds the last three. */
export function siteVerb<S extends z.ZodType, R>(spec: {
  act: Act;
  input: S;
  run: (tools: SiteTools<z.output<S>>) => Promise<R>;
}): Verb<S, R, { kind: 'site'; act: Act }> {
  const call = async ({ ctx, input }: { ctx: Ctx; input: unknown }): Promise<R> => {
    const person = signedIn(ctx);
    const siteId = siteIdOf(input);
    return withSite(siteId, async (tx) => {
      const role = await mayHere(tx, ctx, siteId, spec.act);
      const rest = { ...(input as Record<string, unknown>) };
      delete rest.siteId;
      const parsed = parse(spec.input, rest);
      return spec.run({
        ctx,
        tx,
        siteId,
        role,
        person,
        input: parsed,
        audit: (entry) => audit(tx, ctx, siteId, entry),
      });
    });
  };
  return Object.assign(call, { guard: { kind: 'site' as const, act: spec.act }, schema: spec.input });
}

/** For what a person does outside any one site. */
export function personVerb<S extends z.ZodType, R>(spec: {
  input: S;
  run: (tools: { ctx: Ctx; tx: Transaction; person: SignedIn; sessionId: string; input: z.output<S> }) => Promise<R>;
}): Verb<S, R, { kind: 'person' }> {
  const call = async ({ ctx, input }: { ctx: Ctx; input: unknown }): Promise<R> => {
    const person = signedIn(ctx);
    const sessionId = ctx.actor.kind === 'person' ? ctx.actor.sessionId : '';
    const parsed = parse(spec.input, input);
    return withPeople((tx) => spec.run({ ctx, tx, person, sessionId, input: parsed }));
  };
  return Object.assign(call, { guard: { kind: 'person' as const }, schema: spec.input });
}

/** A person's verb that opens its own transactions: over several sites one after the other, or around a password hash. */
export function openPersonVerb<S extends z.ZodType, R>(spec: {
  input: S;
  run: (tools: { ctx: Ctx; person: SignedIn; sessionId: string; input: z.output<S> }) => Promise<R>;
}): Verb<S, R, { kind: 'person' }> {
  const call = async ({ ctx, input }: { ctx: Ctx; input: unknown }): Promise<R> => {
    const person = signedIn(ctx);
    const sessionId = ctx.actor.kind === 'person' ? ctx.actor.sessionId : '';
    return spec.run({ ctx, person, sessionId, input: parse(spec.input, input) });
  };
  return Object.assign(call, { guard: { kind: 'person' as const }, schema: spec.input });
}

/** For the doors before a sign-in. `run` opens its own transactions: hashing a password must not hold a connection. */
export function publicVerb<S extends z.ZodType, R>(spec: {
  input: S;
  run: (tools: { ctx: Ctx; input: z.output<S> }) => Promise<R>;
}): Verb<S, R, { kind: 'public' }> {
  const call = async ({ ctx, input }: { ctx: Ctx; input: unknown }): Promise<R> =>
    spec.run({ ctx, input: parse(spec.input, input) });
  return Object.assign(call, { guard: { kind: 'public' as const }, schema: spec.input });
}

/** For jobs: only the worker's own context opens it. */
export function workerVerb<S extends z.ZodType, R>(spec: {
  input: S;
  run: (tools: { ctx: Ctx; input: z.output<S> }) => Promise<R>;
}): Verb<S, R, { kind: 'worker' }> {
  const call = async ({ ctx, input }: { ctx: Ctx; input: unknown }): Promise<R> => {
    if (ctx.actor.kind !== 'worker') throw notFound();
    return spec.run({ ctx, input: parse(spec.input, input) });
  };
  return Object.assign(call, { guard: { kind: 'worker' as const }, schema: spec.input });
}
