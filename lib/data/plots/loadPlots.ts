import { and, asc, eq, isNotNull, isNull, type SQL, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { planting, plot, result, sample } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import type { Planting, Plot } from '@/lib/schemas/plots';
import { areaOf, pointsOf } from './area';

type PlotColumns = typeof plot.$inferSelect;
type PlantingColumns = typeof planting.$inferSelect;

export const toPlanting = (row: PlantingColumns): Planting => ({
  id: row.id,
  year: row.year,
  crop: row.crop,
  targetSetKey: row.targetSetKey,
  plannedOn: row.plannedOn,
});

/** The newest bag that has live results; asked through samples, of which there are few. */
const lastTestedOn = sql<string | null>`(
  select s.taken_on from ${sample} s
  where s.site_id = ${plot.siteId} and s.plot_id = ${plot.id} and exists (
    select 1 from ${result} r where r.site_id = s.site_id and r.sample_id = s.id and r.superseded_at is null)
  order by s.taken_on desc limit 1)`;

const lastPh = sql<{ takenOn: string; value: string | null; printed: string } | null>`(
  select json_build_object('takenOn', r.taken_on, 'value', r.value::text, 'printed', r.printed) from ${result} r
  where r.site_id = ${plot.siteId} and r.plot_id = ${plot.id} and r.analyte = 'soil_ph_water' and r.superseded_at is null
  order by r.taken_on desc, r.analysis, r.id limit 1)`;

function toPlot(row: PlotColumns, plantingRow: PlantingColumns | null, testedOn: string | null, ph: unknown): Plot {
  return {
    id: row.id,
    name: row.name,
    outline: row.outline.length < 3 ? null : pointsOf(row.outline),
    outlineSince: row.outlineSince,
    areaTypedM2: row.areaTypedM2 === null ? null : Number(row.areaTypedM2),
    area: areaOf(row),
    texture: row.texture,
    established: row.established,
    freeLimeSeen: row.freeLimeSeen,
    targetSetKey: row.targetSetKey,
    notes: row.notes,
    archivedAt: row.archivedAt?.toISOString() ?? null,
    version: row.version,
    planting: plantingRow ? toPlanting(plantingRow) : null,
    lastTest: testedOn === null ? null : { takenOn: testedOn, ph: ph as NonNullable<Plot['lastTest']>['ph'] },
  };
}

async function load(tx: Transaction, siteId: SiteId, year: number, only: SQL | undefined): Promise<Plot[]> {
  const rows = await tx
    .select({ plot, planting, testedOn: lastTestedOn, ph: lastPh })
    .from(plot)
    .leftJoin(planting, and(eq(planting.siteId, plot.siteId), eq(planting.plotId, plot.id), eq(planting.year, year)))
    .where(and(eq(plot.siteId, siteId), only))
    .orderBy(asc(sql`lower(${plot.name})`), asc(plot.id), asc(planting.createdAt));
  const seen = new Set<string>();
  const plots: Plot[] = [];
  for (const row of rows) {
    if (seen.has(row.plot.id)) continue;
    seen.add(row.plot.id);
    plots.push(toPlot(row.plot, row.planting, row.testedOn, row.ph));
  }
  return plots;
}

export const loadPlots = (tx: Transaction, siteId: SiteId, year: number, archived: boolean): Promise<Plot[]> =>
  load(tx, siteId, year, archived ? isNotNull(plot.archivedAt) : isNull(plot.archivedAt));

export const loadPlot = async (tx: Transaction, siteId: SiteId, year: number, id: string): Promise<Plot | undefined> =>
  (await load(tx, siteId, year, eq(plot.id, id)))[0];
