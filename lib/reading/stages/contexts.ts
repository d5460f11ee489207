import type { Identity } from '../candidate';
import { type IdentityHit, identityOf } from './identity';

export type Context = { readonly page: number; readonly y0: number; readonly x0: number; readonly identity: Identity };

/** A sample's own words start a new context; a date or depth alone does not. */
const STARTS = ['sampleId', 'labNumber'] as const;
const SHARED = ['dateSampled', 'dateReported', 'depth'] as const;

type Group = { readonly anchor: IdentityHit; readonly hits: IdentityHit[] };

/** Anchors nearer than this in height stand side by side. */
const LEVEL = 6;

function isAnchor(hit: IdentityHit): boolean {
  return STARTS.some((field) => field === hit.field);
}

/** Of groups that begin side by side, the one under whose first words a hit stands. */
function besideOf(groups: readonly Group[], last: Group, hit: IdentityHit): Group {
  const level = groups.filter(
    (group) => group.anchor.page === last.anchor.page && Math.abs(group.anchor.y0 - last.anchor.y0) < LEVEL,
  );
  const left = level.filter((group) => group.anchor.x0 <= hit.x0 + 2);
  return left[left.length - 1] ?? last;
}

/**
 * Stage 6c. The samples that form boxes speak of, in reading order; a name or number of a sample begins one, and what
 * is said before the first holds for all.
 */
export function contextsOf(hits: readonly IdentityHit[]): Context[] {
  const sorted = [...hits].sort((a, b) => a.page - b.page || a.y0 - b.y0 || a.x0 - b.x0);
  const groups: Group[] = [];
  const before: IdentityHit[] = [];
  for (const hit of sorted) {
    const last = groups[groups.length - 1];
    if (last === undefined) {
      if (isAnchor(hit)) groups.push({ anchor: hit, hits: [hit] });
      else before.push(hit);
      continue;
    }
    const home = besideOf(groups, last, hit);
    const held = home.hits.find((other) => other.field === hit.field);
    if (isAnchor(hit) && held !== undefined && held.value !== hit.value) groups.push({ anchor: hit, hits: [hit] });
    else home.hits.push(hit);
  }
  const shared = identityOf(before);
  if (groups.length === 0) {
    const [first] = before;
    return first === undefined ? [] : [{ page: first.page, y0: first.y0, x0: first.x0, identity: shared }];
  }
  const contexts = groups.map(({ anchor, hits: own }) => ({
    page: anchor.page,
    y0: anchor.y0,
    x0: anchor.x0,
    identity: { ...shared, ...identityOf(own) },
  }));
  const first = contexts[0]?.identity ?? {};
  return contexts.map((context) => ({ ...context, identity: withShared(context.identity, first) }));
}

/** What is said once for several samples: days and depth where they are missing, never another sample's name or number. */
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
      const beside = best !== null && best.page === context.page && Math.abs(best.y0 - context.y0) < LEVEL;
      // The title of a panel may be set in from the table under it.
      const slack = best === null ? 0 : Math.min(60, 0.25 * (context.x0 - best.x0));
      if (!beside || context.x0 - slack <= x + 2) best = context;
    }
  }
  return best ?? contexts.find((context) => context.page === page) ?? null;
}
