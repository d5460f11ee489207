import { and, desc, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { planting } from '@/db/schema';
import { civil, type Day } from '@/lib/domain/days';
import type { SiteId } from '@/lib/domain/ids';
import { citation } from '@/lib/domain/materials';
import { targetSet } from '@/lib/domain/targets';
import type { PlotRow } from '../plots/getPlotInSite';
import { loadOwnSets } from '../targets/loadOwnSets';

export type Band = {
  analyte: string;
  low: number | null;
  high: number | null;
  unit: string | null;
  method: string | null;
  label: string;
  source: string;
};

/** The bands that hold for a plot today: of this year's crop, else of the plot itself. */
export async function bandsOf(tx: Transaction, siteId: SiteId, plotRow: PlotRow, today: Day): Promise<Band[]> {
  const [crop] = await tx
    .select()
    .from(planting)
    .where(and(eq(planting.siteId, siteId), eq(planting.plotId, plotRow.id), eq(planting.year, civil(today).year)))
    .orderBy(desc(planting.createdAt))
    .limit(1);
  const key = crop?.targetSetKey ?? plotRow.targetSetKey;
  if (!key) return [];
  const published = targetSet(key);
  if (published.ok) {
    return published.set.bands.map((band) => ({
      analyte: band.analyte,
      low: band.low,
      high: band.high,
      unit: band.unit,
      method: band.method,
      label: published.set.name,
      source: citation(band.source),
    }));
  }
  const [own] = await loadOwnSets(tx, siteId, key);
  if (!own || own.validFrom > today) return [];
  return own.bands.map((band) => ({
    analyte: band.analyte,
    low: Number(band.low),
    high: Number(band.high),
    unit: band.unit,
    method: band.method,
    label: own.name,
    source: 'your own target',
  }));
}
