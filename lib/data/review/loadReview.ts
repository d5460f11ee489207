import { and, asc, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { readingRow, reportSample } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import type { RowColumns } from './reviewRow';
import type { SampleColumns } from './sampleStore';

/** Samples and rows of a report as they stand. */
export async function loadReview(
  tx: Transaction,
  siteId: SiteId,
  reportId: string,
): Promise<{ samples: SampleColumns[]; rows: RowColumns[] }> {
  const samples = await tx
    .select()
    .from(reportSample)
    .where(and(eq(reportSample.siteId, siteId), eq(reportSample.reportId, reportId)))
    .orderBy(asc(reportSample.ordinal));
  const rows = await tx
    .select()
    .from(readingRow)
    .where(and(eq(readingRow.siteId, siteId), eq(readingRow.reportId, reportId)))
    .orderBy(asc(readingRow.ordinal), asc(readingRow.id));
  return { samples, rows };
}
