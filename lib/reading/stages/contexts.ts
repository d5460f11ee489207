import type { Identity } from '../candidate';
import { type IdentityHit, identityOf } from './identity';

export type Context = { readonly page: number; readonly y0: number; readonly x0: number; readonly identity: Identity };

/** A sample's own words start a new context; a date or depth alone does not. */
const STARTS = ['sampleId', 'labNumber'] as const;
const SHARED = ['dateSampled', 'dateReported', 'depth'] as const;

/** Of groups that begin side by side, the one under whose first words a hit stands. */
function besideOf(groups: readonly IdentityHit[][], last: IdentityHit[], hit: IdentityHit): IdentityHit[] {
  const level = groups.filter(
    (group) => group[0]?.page === last[0]?.page && Math.abs((group[0]?.y0 ?? 0) - (last[0]?.y0 ?? 0)) < 2,
  );
  const left = level.filter((group) => (group[0]?.x0 ?? 0) <= hit.x0 + 2);
  return left[left.length - 1] ?? last;
}

/** Stage 6c. The samples that form boxes speak of, in reading order; what is said once holds for all. */
export function contextsOf(hits: readonly IdentityHit[]): Context[] {
  const sorted = [...hits].sort((a, b) => a.page - b.page || a.y0 - b.y0 || a.x0 - b.x0);
  const groups: IdentityHit[][] = [];
  for (const hit of sorted) {
    const group = groups[groups.length - 1];
    const held = group?.find((other) => other.field === hit.field);
    const starts = STARTS.some((field) => field === hit.field);
    if (group === undefined || (starts && held !== undefined && held.value !== hit.value)) groups.push([hit]);
    else besideOf(groups, group, hit).push(hit);
  }
  const contexts = groups.map((group) => ({
    page: group[0]?.page ?? 1,
    y0: group[0]?.y0 ?? 0,
    x0: group[0]?.x0 ?? 0,
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

/** The context that rules a place: the last one that begins at or above it; of two side by side, the one on its left. */
export function contextAt(
  contexts: readonly Context[],
  page: number,
  y: number,
  x = Number.POSITIVE_INFINITY,
): Context | null {
  let best: Context | null = null;
  for (const context of contexts) {
    if (context.page < page || (context.page === page && context.y0 <= y + 2)) {
      const beside = best !== null && best.page === context.page && Math.abs(best.y0 - context.y0) < 2;
      if (!beside || context.x0 <= x + 2) best = context;
    }
  }
  return best ?? contexts.find((context) => context.page === page) ?? null;
}
