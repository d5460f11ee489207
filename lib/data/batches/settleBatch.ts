import { and, eq, inArray, isNull, notExists, or, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { report, reportSample, uploadBatch, uploadBatchFile } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import { fileStage } from '@/lib/schemas/batches';
import { audit } from '../audit';
import type { Ctx } from '../context';
import { type BatchNews, queueBatchReady } from '../mail/queueReady';
import { isMember } from '../sites/isMember';
import type { BatchRow } from './getBatchInSite';

/** Announced files that have not come for this long are not waited for: the browser that had them is gone. */
export const QUIET_MS = 30 * 60_000;

/** Ready, once and by one worker only: the update decides, so that a letter leaves at most once. */
async function markReady(tx: Transaction, ctx: Ctx, siteId: SiteId, batchId: string): Promise<BatchRow | undefined> {
  const quietSince = new Date(ctx.now.getTime() - QUIET_MS).toISOString();
  const waitedFor = tx
    .select({ id: uploadBatchFile.id })
    .from(uploadBatchFile)
    .leftJoin(report, and(eq(report.siteId, siteId), eq(report.id, uploadBatchFile.reportId)))
    .where(
      and(
        eq(uploadBatchFile.siteId, siteId),
        eq(uploadBatchFile.batchId, batchId),
        or(
          and(eq(uploadBatchFile.state, 'announced'), sql`${uploadBatch.movedAt} > ${quietSince}::timestamptz`),
          inArray(report.state, ['received', 'reading']),
        ),
      ),
    );
  const [row] = await tx
    .update(uploadBatch)
    .set({ readyAt: ctx.now })
    .where(
      and(
        eq(uploadBatch.siteId, siteId),
        eq(uploadBatch.id, batchId),
        isNull(uploadBatch.readyAt),
        notExists(waitedFor),
      ),
    )
    .returning();
  return row;
}

async function newsOf(tx: Transaction, siteId: SiteId, batchId: string): Promise<BatchNews> {
  const files = await tx
    .select({
      state: uploadBatchFile.state,
      reportState: report.state,
      samples: sql<number>`(select count(*)::int from ${reportSample} s where s.site_id = ${siteId} and s.report_id = ${report.id})`,
    })
    .from(uploadBatchFile)
    .leftJoin(report, and(eq(report.siteId, siteId), eq(report.id, uploadBatchFile.reportId)))
    .where(and(eq(uploadBatchFile.siteId, siteId), eq(uploadBatchFile.batchId, batchId)));
  const stages = files.map((file) => ({
    stage: fileStage({ state: file.state, report: file.reportState === null ? null : { state: file.reportState } }),
    samples: file.samples,
  }));
  const count = (stage: string) => stages.filter((one) => one.stage === stage).length;
  const toReview = stages.filter((one) => one.stage === 'toReview');
  return {
    files: files.length,
    toReview: toReview.length,
    samples: toReview.reduce((sum, one) => sum + one.samples, 0),
    notRead: count('notRead'),
    notTaken: count('notTaken'),
    missing: count('missing'),
  };
}

/** Says that all of a batch is read, when it is, and to whoever wished to be written to. True when it was this call that said it. */
export async function settleBatch(tx: Transaction, ctx: Ctx, siteId: SiteId, batchId: string): Promise<boolean> {
  const batch = await markReady(tx, ctx, siteId, batchId);
  if (!batch) return false;
  const news = await newsOf(tx, siteId, batch.id);
  await audit(tx, ctx, siteId, { act: 'batch.ready', objectKind: 'batch', objectId: batch.id, detail: news });
  if (batch.mailWanted && (await isMember(tx, siteId, batch.createdBy)))
    await queueBatchReady(tx, ctx, siteId, batch, news);
  return true;
}
