import { and, eq, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { readingRow } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import { notFound, Problem } from '@/lib/errors';
import type { ReviewRow } from '@/lib/schemas/review';
import { namesOf } from '../people/names';
import { type RowColumns, toReviewRow } from './reviewRow';

/** Row and report are tied in one query: a row of another report is not found. */
export async function getRowInReport(
  tx: Transaction,
  siteId: SiteId,
  reportId: string,
  rowId: string,
): Promise<RowColumns> {
  const rows = await tx
    .select()
    .from(readingRow)
    .where(and(eq(readingRow.siteId, siteId), eq(readingRow.reportId, reportId), eq(readingRow.id, rowId)))
    .limit(1);
  const row = rows[0];
  if (!row) throw notFound();
  return row;
}

type Change = Partial<Omit<typeof readingRow.$inferInsert, 'siteId' | 'id' | 'reportId' | 'version'>>;

/** Undefined: somebody saved this row since `version` was on screen. */
export async function writeRow(
  tx: Transaction,
  siteId: SiteId,
  at: { reportId: string; rowId: string; version: number },
  change: Change,
): Promise<RowColumns | undefined> {
  const [row] = await tx
    .update(readingRow)
    .set({ ...change, version: sql`${readingRow.version} + 1` })
    .where(
      and(
        eq(readingRow.siteId, siteId),
        eq(readingRow.reportId, at.reportId),
        eq(readingRow.id, at.rowId),
        eq(readingRow.version, at.version),
      ),
    )
    .returning();
  return row;
}

export async function rowAnswer(tx: Transaction, row: RowColumns): Promise<ReviewRow> {
  return toReviewRow(row, await namesOf(tx, row.editedBy === null ? [] : [row.editedBy]));
}

export const STALE_ROW = 'Somebody changed this row while you had it open. Yours was not saved yet; compare the two.';

export const staleRow = (current: ReviewRow): Problem =>
  new Problem('conflict', STALE_ROW, { reason: 'stale-version', current });
