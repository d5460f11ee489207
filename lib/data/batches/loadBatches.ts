import { and, asc, desc, eq, inArray, type SQL } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { report, uploadBatch, uploadBatchFile } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import { type BatchHead, countFiles } from '@/lib/schemas/batches';
import { namesOf } from '../people/names';
import type { BatchRow } from './getBatchInSite';

export const whoSent = (row: BatchRow, names: ReadonlyMap<string, string>) => ({
  id: row.createdBy,
  name: names.get(row.createdBy) ?? 'somebody who has left',
});

/** Batches, newest first, with how far their files are. */
export async function loadBatches(tx: Transaction, siteId: SiteId, most: number, only?: SQL): Promise<BatchHead[]> {
  const rows = await tx
    .select()
    .from(uploadBatch)
    .where(and(eq(uploadBatch.siteId, siteId), only))
    .orderBy(desc(uploadBatch.createdAt), desc(uploadBatch.id))
    .limit(most);
  if (rows.length === 0) return [];
  const files = await tx
    .select({ batchId: uploadBatchFile.batchId, state: uploadBatchFile.state, reportState: report.state })
    .from(uploadBatchFile)
    .leftJoin(report, and(eq(report.siteId, siteId), eq(report.id, uploadBatchFile.reportId)))
    .where(
      and(
        eq(uploadBatchFile.siteId, siteId),
        inArray(
          uploadBatchFile.batchId,
          rows.map((row) => row.id),
        ),
      ),
    )
    .orderBy(asc(uploadBatchFile.ordinal));
  const names = await namesOf(
    tx,
    rows.map((row) => row.createdBy),
  );
  return rows.map((row) => ({
    id: row.id,
    createdBy: whoSent(row, names),
    createdAt: row.createdAt.toISOString(),
    readyAt: row.readyAt?.toISOString() ?? null,
    counts: countFiles(
      files
        .filter((file) => file.batchId === row.id)
        .map(({ state, reportState }) => ({ state, report: reportState === null ? null : { state: reportState } })),
    ),
  }));
}

/** Those that still ask something of somebody: files on their way, being read, or to be reviewed. */
export const isOpenBatch = ({ counts }: BatchHead): boolean => counts.missing + counts.beingRead + counts.toReview > 0;
