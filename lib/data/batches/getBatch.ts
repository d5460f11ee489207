import { and, asc, eq, inArray } from 'drizzle-orm';
import { report, uploadBatchFile } from '@/db/schema';
import { type Batch, batchInput, countFiles } from '@/lib/schemas/batches';
import { namesOf } from '../people/names';
import { loadReports } from '../reports/loadReports';
import { siteVerb } from '../verb';
import { getBatchInSite } from './getBatchInSite';
import { whoSent } from './loadBatches';

/** One batch: every file of it and how far it is; screens ask again while something moves. */
export const getBatch = siteVerb({
  act: 'site.read',
  input: batchInput,
  run: async ({ ctx, tx, siteId, input }): Promise<Batch> => {
    const row = await getBatchInSite(tx, siteId, input.batchId);
    const inBatch = and(eq(uploadBatchFile.siteId, siteId), eq(uploadBatchFile.batchId, row.id));
    const rows = await tx.select().from(uploadBatchFile).where(inBatch).orderBy(asc(uploadBatchFile.ordinal));
    const mine = tx.select({ id: uploadBatchFile.reportId }).from(uploadBatchFile).where(inBatch);
    const reports = await loadReports(tx, siteId, ctx.now, inArray(report.id, mine));
    const byId = new Map(reports.map((one) => [one.id, one]));
    const files = rows.map((file) => {
      const found = file.reportId === null ? undefined : byId.get(file.reportId);
      const { id, ordinal, fileName, bytes, state, refusal } = file;
      return { id, ordinal, fileName, bytes, state, refusal, report: found ?? null };
    });
    return {
      id: row.id,
      createdBy: whoSent(row, await namesOf(tx, [row.createdBy])),
      createdAt: row.createdAt.toISOString(),
      readyAt: row.readyAt?.toISOString() ?? null,
      mailWanted: row.mailWanted,
      counts: countFiles(files),
      files,
    };
  },
});
