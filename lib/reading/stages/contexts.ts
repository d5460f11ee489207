import type { Identity } from '../candidate';
import { type IdentityHit, identityOf } from './identity';

export type Context = { readonly page: number; readonly y0: number; readonly identity: Identity };

/** A sample's own words start a new context; a date or depth alone does not. */
const STARTS = ['sampleId', 'labNumber'] as const;
const SHARED = ['dateSampled', 'dateReported', 'depth'] as const;

/** Stage 6c. The samples that form boxes speak of, in reading order; what is said once holds for all. */
export function contextsOf(hits: readonly IdentityHit[]): Context[] {
  const sorted = [...hits].sort((a, b) => a.page - b.page || a.y0 - b.y0 || a.x0 - b.x0);
  const groups: IdentityHit[][] = [];
  for (const hit of sorted) {
    const group = groups[groups.length - 1];
    const held = group?.find((other) => other.field === hit.field);
    const starts = STARTS.some((field) => field === hit.field);
    if (group === undefined || (starts && held !== undefined && held.value !== hit.value)) groups.push([hit]);
    else group.push(hit);
  }
  const contexts = groups.map((group) => ({
    page: group[0]?.page ?? 1,
    y0: group[0]?.y0 ?? 0,
    identity: identityOf(group),
  }));
  const first = contexts[0]?.identity ?? {};
  return contexts.map((context) => ({ ...context, identity: withShared(context.identity, first) }));
}

export function withShared(identity: Identity, shared: Identity): Identity {
  const filled: Identity = { ...identity };
  for (const field of SHARED) {
    const value = shared[field];
    if (filled[field] === undefined && value !== undefined) filled[field] = value;
  }
  return filled;
}

/** The context that rules a place: the last one that begins at or above it. */
export function contextAt(contexts: readonly Context[], page: number, y: number): Context | null {
  let best: Context | null = null;
  for (const context of contexts) {
    if (context.page < page || (context.page === page && context.y0 <= y + 2)) best = context;
  }
  return best ?? contexts.find((context) => context.page === page) ?? null;
}
