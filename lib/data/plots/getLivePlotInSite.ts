import type { Transaction } from '@/db/client';
import type { SiteId } from '@/lib/domain/ids';
import { Problem } from '@/lib/errors';
import { getPlotInSite, type PlotRow } from './getPlotInSite';

/** A plot that something new may be put on. */
export async function getLivePlotInSite(tx: Transaction, siteId: SiteId, plotId: string): Promise<PlotRow> {
  const row = await getPlotInSite(tx, siteId, plotId);
  if (!row.archivedAt) return row;
  throw new Problem(
    'conflict',
    `${row.name} is archived. Bring it back on the ground page first, or choose another plot.`,
    {
      reason: 'archived',
    },
  );
}
