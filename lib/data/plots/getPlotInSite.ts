import { and, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { plot } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import { notFound } from '@/lib/errors';

export type PlotRow = typeof plot.$inferSelect;

export async function getPlotInSite(tx: Transaction, siteId: SiteId, plotId: string): Promise<PlotRow> {
  const rows = await tx
    .select()
    .from(plot)
    .where(and(eq(plot.siteId, siteId), eq(plot.id, plotId)))
    .limit(1);
  const row = rows[0];
  if (!row) throw notFound();
  return row;
}
