import { and, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { pageCopy } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import { notFound } from '@/lib/errors';
import type { PageCopy } from '@/lib/schemas/copies';

export type CopyRow = typeof pageCopy.$inferSelect;

export const toCopy = (row: CopyRow): PageCopy => ({
  id: row.id,
  reportId: row.reportId,
  page: row.page,
  state: row.state,
  sentence: row.sentence,
  wordsKept: row.wordsKept,
  wordsMasked: row.wordsMasked,
  askedAt: row.askedAt.toISOString(),
});

export async function getCopyInReport(
  tx: Transaction,
  siteId: SiteId,
  reportId: string,
  copyId: string,
): Promise<CopyRow> {
  const [row] = await tx
    .select()
    .from(pageCopy)
    .where(and(eq(pageCopy.siteId, siteId), eq(pageCopy.reportId, reportId), eq(pageCopy.id, copyId)))
    .limit(1);
  if (!row) throw notFound();
  return row;
}

/** Where its two files lie, under this site whatever the row says. */
export const keysOf = (row: CopyRow): string[] =>
  [row.pictureKey, row.bundleKey].filter((key): key is string => key?.startsWith(`site/${row.siteId}/`) === true);
