import { and, asc, eq, inArray, or, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { report, reportSample, uploadBatchFile } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import { assignPlotsInput, type PlotOutcomes } from '@/lib/schemas/batches';
import { getLivePlotInSite } from '../plots/getLivePlotInSite';
import { refreshHistoryDoubts } from '../review/refreshHistoryDoubts';
import { siteVerb } from '../verb';
import { getBatchInSite } from './getBatchInSite';

type Edit = { reportSampleId: string; version: number; plotId: string | null };
type Outcome = PlotOutcomes['outcomes'][number];

const STALE = 'Somebody changed this sample while you had it open. It stands as they left it.';
const MOVED_ON = 'Its report is not open for review any more, so its plot was not changed.';
const NOT_HERE = 'This sample is not among those of this batch.';

/** Keeps the reports of these samples in review until this is through: a confirmation waits, or is told of here. */
async function openSamples(tx: Transaction, siteId: SiteId, batchId: string, ids: readonly string[]) {
  const inBatch = tx
    .select({ id: uploadBatchFile.reportId })
    .from(uploadBatchFile)
    .where(and(eq(uploadBatchFile.siteId, siteId), eq(uploadBatchFile.batchId, batchId)));
  const samples = await tx
    .select({ id: reportSample.id, reportId: reportSample.reportId })
    .from(reportSample)
    .where(
      and(eq(reportSample.siteId, siteId), inArray(reportSample.id, [...ids]), inArray(reportSample.reportId, inBatch)),
    );
  const reportIds = [...new Set(samples.map((sample) => sample.reportId))];
  const reports =
    reportIds.length === 0
      ? []
      : await tx
          .select({ id: report.id, state: report.state })
          .from(report)
          .where(and(eq(report.siteId, siteId), inArray(report.id, reportIds)))
          .orderBy(asc(report.id))
          .for('share');
  const stateOf = new Map(reports.map((one) => [one.id, one.state]));
  return new Map(samples.map((sample) => [sample.id, stateOf.get(sample.reportId) ?? null]));
}

async function writePlot(tx: Transaction, siteId: SiteId, plotId: string | null, edits: readonly Edit[]) {
  const rows = await tx
    .update(reportSample)
    .set({ plotId, version: sql`${reportSample.version} + 1` })
    .where(
      and(
        eq(reportSample.siteId, siteId),
        or(
          ...edits.map((edit) => and(eq(reportSample.id, edit.reportSampleId), eq(reportSample.version, edit.version))),
        ),
      ),
    )
    .returning({ id: reportSample.id });
  return rows.map((row) => row.id);
}

/** The plots of many samples at once. Each sample is saved whole or not at all, whatever happens to its neighbours. */
export const assignPlots = siteVerb({
  act: 'reading.work',
  input: assignPlotsInput,
  run: async ({ tx, siteId, input, audit }): Promise<PlotOutcomes> => {
    const batch = await getBatchInSite(tx, siteId, input.batchId);
    const plotIds = [...new Set(input.edits.map((edit) => edit.plotId))];
    for (const plotId of plotIds) if (plotId !== null) await getLivePlotInSite(tx, siteId, plotId);
    const states = await openSamples(
      tx,
      siteId,
      batch.id,
      input.edits.map((edit) => edit.reportSampleId),
    );
    const open = input.edits.filter((edit) => states.get(edit.reportSampleId) === 'in-review');
    const saved = new Set<string>();
    for (const plotId of plotIds) {
      const edits = open.filter((edit) => edit.plotId === plotId);
      if (edits.length > 0) for (const id of await writePlot(tx, siteId, plotId, edits)) saved.add(id);
    }
    await refreshHistoryDoubts(tx, siteId, [...saved]);
    if (saved.size > 0) {
      const detail = { samples: saved.size, plots: plotIds.length };
      await audit({ act: 'batch.assign-plots', objectKind: 'batch', objectId: batch.id, detail });
    }
    const outcomes = input.edits.map(({ reportSampleId }): Outcome => {
      if (saved.has(reportSampleId)) return { reportSampleId, kind: 'saved', sentence: null };
      const state = states.get(reportSampleId);
      if (state === 'in-review') return { reportSampleId, kind: 'stale', sentence: STALE };
      return { reportSampleId, kind: 'refused', sentence: state === undefined ? NOT_HERE : MOVED_ON };
    });
    return { outcomes };
  },
});
