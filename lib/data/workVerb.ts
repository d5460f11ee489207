import type { z } from 'zod';
import type { Act, Role } from '@/lib/access/table';
import type { SiteId } from '@/lib/domain/ids';
import { audit } from './audit';
import type { Ctx, SignedIn } from './context';
import { withSite } from './transaction';
import { mayHere, parse, type SiteTools, signedIn, siteIdOf, type Verb } from './verb';

export type SiteWorkTools<I> = {
  ctx: Ctx;
  siteId: SiteId;
  role: Role;
  person: SignedIn;
  input: I;
  /** One transaction on the site. It asks for the right again: somebody may have been removed while the file was on its way. */
  inSite: <T>(run: (tools: SiteTools<I>) => Promise<T>) => Promise<T>;
};

/** For work that must hold no transaction while it waits (the file store): the first two beats in one of their own. */
export function siteWorkVerb<S extends z.ZodType, R>(spec: {
  act: Act;
  input: S;
  run: (tools: SiteWorkTools<z.output<S>>) => Promise<R>;
}): Verb<S, R, { kind: 'site'; act: Act }> {
  const call = async ({ ctx, input }: { ctx: Ctx; input: unknown }): Promise<R> => {
    const person = signedIn(ctx);
    const siteId = siteIdOf(input);
    const role = await withSite(siteId, (tx) => mayHere(tx, ctx, siteId, spec.act));
    const rest = { ...(input as Record<string, unknown>) };
    delete rest.siteId;
    const parsed = parse(spec.input, rest);
    const inSite: SiteWorkTools<z.output<S>>['inSite'] = (run) =>
      withSite(siteId, async (tx) =>
        run({
          ctx,
          tx,
          siteId,
          role: await mayHere(tx, ctx, siteId, spec.act),
          person,
          input: parsed,
          audit: (entry) => audit(tx, ctx, siteId, entry),
        }),
      );
    return spec.run({ ctx, siteId, role, person, input: parsed, inSite });
  };
  return Object.assign(call, { guard: { kind: 'site' as const, act: spec.act }, schema: spec.input });
}
