import { and, eq, inArray, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { uploadBatch, uploadBatchFile } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import { notFound } from '@/lib/errors';
import type { Ctx } from '../context';
import { enqueue } from '../transaction';

export type BatchFileRow = typeof uploadBatchFile.$inferSelect;

export async function getBatchFileInSite(
  tx: Transaction,
  siteId: SiteId,
  fileId: string,
  batchId?: string,
): Promise<BatchFileRow> {
  const [row] = await tx
    .select()
    .from(uploadBatchFile)
    .where(
      and(
        eq(uploadBatchFile.siteId, siteId),
        eq(uploadBatchFile.id, fileId),
        batchId === undefined ? undefined : eq(uploadBatchFile.batchId, batchId),
      ),
    )
    .limit(1);
  if (!row) throw notFound();
  return row;
}

/** Something of the batch has moved: whether nothing is waited for any more is asked once this is through. */
export async function noteMoved(tx: Transaction, ctx: Ctx, siteId: SiteId, batchId: string): Promise<void> {
  await tx
    .update(uploadBatch)
    .set({ movedAt: ctx.now })
    .where(and(eq(uploadBatch.siteId, siteId), eq(uploadBatch.id, batchId)));
  await enqueue(tx, 'tell-batch', { siteId, id: batchId });
}

/** The announced file is here: as a report of its own, or as one that came another time. */
export async function noteArrival(
  tx: Transaction,
  ctx: Ctx,
  siteId: SiteId,
  fileId: string,
  arrived: { reportId: string; state: 'kept' | 'seen-before' },
): Promise<void> {
  const [row] = await tx
    .update(uploadBatchFile)
    .set({ ...arrived, refusal: null })
    .where(
      and(
        eq(uploadBatchFile.siteId, siteId),
        eq(uploadBatchFile.id, fileId),
        // A try whose answer was lost meets its own report and changes nothing.
        sql`${uploadBatchFile.reportId} is distinct from ${arrived.reportId}`,
      ),
    )
    .returning({ batchId: uploadBatchFile.batchId });
  if (row) await noteMoved(tx, ctx, siteId, row.batchId);
}

/** Announced files that are not waited for any more, or one that was not taken. */
export async function closeFiles(
  tx: Transaction,
  siteId: SiteId,
  batchId: string,
  change: { state: 'refused' | 'left-out'; refusal: string | null; fileId?: string },
): Promise<number> {
  const from = change.state === 'refused' ? (['announced', 'refused', 'left-out'] as const) : (['announced'] as const);
  const rows = await tx
    .update(uploadBatchFile)
    .set({ state: change.state, refusal: change.refusal })
    .where(
      and(
        eq(uploadBatchFile.siteId, siteId),
        eq(uploadBatchFile.batchId, batchId),
        change.fileId === undefined ? undefined : eq(uploadBatchFile.id, change.fileId),
        inArray(uploadBatchFile.state, [...from]),
      ),
    )
    .returning({ id: uploadBatchFile.id });
  return rows.length;
}
