import { and, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { uploadBatch } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import { notFound } from '@/lib/errors';

export type BatchRow = typeof uploadBatch.$inferSelect;

export async function getBatchInSite(tx: Transaction, siteId: SiteId, batchId: string): Promise<BatchRow> {
  const [row] = await tx
    .select()
    .from(uploadBatch)
    .where(and(eq(uploadBatch.siteId, siteId), eq(uploadBatch.id, batchId)))
    .limit(1);
  if (!row) throw notFound();
  return row;
}
