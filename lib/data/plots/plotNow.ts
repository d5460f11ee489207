import type { Transaction } from '@/db/client';
import { civil } from '@/lib/domain/days';
import type { SiteId } from '@/lib/domain/ids';
import { notFound, Problem } from '@/lib/errors';
import type { Plot } from '@/lib/schemas/plots';
import type { Ctx, SignedIn } from '../context';
import { dayOf } from '../days';
import { isUniqueViolation } from '../transaction';
import { loadPlot } from './loadPlots';

export const todayOf = (ctx: Ctx, person: SignedIn) => dayOf(ctx.now, person.timeZone);
export const yearOf = (ctx: Ctx, person: SignedIn): number => civil(todayOf(ctx, person)).year;

/** The plot as it stands after a write. */
export async function plotNow(
  tools: { tx: Transaction; ctx: Ctx; person: SignedIn; siteId: SiteId },
  plotId: string,
): Promise<Plot> {
  const found = await loadPlot(tools.tx, tools.siteId, yearOf(tools.ctx, tools.person), plotId);
  if (!found) throw notFound();
  return found;
}

/** A conditional write met no row: not there at all, or somebody was faster. Shows what stands there now. */
export async function plotConflict(tools: Parameters<typeof plotNow>[0], plotId: string): Promise<Problem> {
  const current = await plotNow(tools, plotId);
  const sentence = current.archivedAt
    ? 'This plot is archived. Bring it back first; what you typed was not saved.'
    : 'Somebody changed this plot while you had it open. What you typed was not saved yet; compare the two.';
  return new Problem('conflict', sentence, {
    reason: current.archivedAt ? 'archived' : 'stale-version',
    current,
  });
}

/** Two live plots of one name could not be told apart on a report. */
export async function nameOnce<T>(name: string, write: () => Promise<T>): Promise<T> {
  try {
    return await write();
  } catch (error) {
    if (!isUniqueViolation(error)) throw error;
    const sentence = `There is already a plot called ${name} here. Give this one another name.`;
    throw new Problem('conflict', sentence, { reason: 'name-taken', fields: { name: sentence } });
  }
}
