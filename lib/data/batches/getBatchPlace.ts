import { and, asc, desc, eq } from 'drizzle-orm';
import { report, uploadBatch, uploadBatchFile } from '@/db/schema';
import { type BatchPlace, batchPlaceInput } from '@/lib/schemas/batches';
import { getReportInSite } from '../reports/getReportInSite';
import { siteVerb } from '../verb';

/** Where a report stands in the newest batch that holds it, and which one of it is reviewed next. */
export const getBatchPlace = siteVerb({
  act: 'reading.work',
  input: batchPlaceInput,
  run: async ({ tx, siteId, input }): Promise<BatchPlace | null> => {
    const here = await getReportInSite(tx, siteId, input.reportId);
    const [found] = await tx
      .select({ batchId: uploadBatchFile.batchId })
      .from(uploadBatchFile)
      .innerJoin(uploadBatch, and(eq(uploadBatch.siteId, siteId), eq(uploadBatch.id, uploadBatchFile.batchId)))
      .where(and(eq(uploadBatchFile.siteId, siteId), eq(uploadBatchFile.reportId, here.id)))
      .orderBy(desc(uploadBatch.createdAt))
      .limit(1);
    if (!found) return null;
    const files = await tx
      .select({ reportId: report.id, state: report.state, fileName: uploadBatchFile.fileName })
      .from(uploadBatchFile)
      .innerJoin(report, and(eq(report.siteId, siteId), eq(report.id, uploadBatchFile.reportId)))
      .where(and(eq(uploadBatchFile.siteId, siteId), eq(uploadBatchFile.batchId, found.batchId)))
      .orderBy(asc(uploadBatchFile.ordinal));
    const at = files.findIndex((file) => file.reportId === here.id);
    // Those after it first, then the ones that were passed over.
    const onwards = [...files.slice(at + 1), ...files.slice(0, Math.max(0, at))];
    const open = onwards.filter((file) => file.state === 'in-review' && file.reportId !== here.id);
    const next = open[0];
    const before = at > 0 ? files[at - 1] : undefined;
    return {
      batchId: found.batchId,
      position: at + 1,
      of: files.length,
      toReview: open.length,
      next: next ? { reportId: next.reportId, fileName: next.fileName } : null,
      before: before ? { reportId: before.reportId, fileName: before.fileName } : null,
    };
  },
});
