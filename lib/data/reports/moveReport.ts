import { and, eq, inArray, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { type ReportState, report } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import { getReportInSite, type ReportRow } from './getReportInSite';
import { stateConflict } from './stateConflict';

type Change = Partial<Omit<typeof report.$inferInsert, 'siteId' | 'id' | 'version'>> & { state: ReportState };

/** One arrow of the states: taken by one writer only, everybody else is told where the report stands. */
export async function moveReport(
  tx: Transaction,
  siteId: SiteId,
  reportId: string,
  from: readonly ReportState[],
  change: Change,
): Promise<ReportRow> {
  const [row] = await tx
    .update(report)
    .set({ ...change, version: sql`${report.version} + 1` })
    .where(and(eq(report.siteId, siteId), eq(report.id, reportId), inArray(report.state, [...from])))
    .returning();
  if (row) return row;
  throw await stateConflict(tx, await getReportInSite(tx, siteId, reportId));
}
