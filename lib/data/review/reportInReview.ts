import type { Transaction } from '@/db/client';
import type { SiteId } from '@/lib/domain/ids';
import { getReportInSite, type ReportRow } from '../reports/getReportInSite';
import { stateConflict } from '../reports/stateConflict';

/** Holds the report in review until the edit is through: a confirmation waits for it, and an edit after it is told. */
export async function reportInReview(
  tx: Transaction,
  siteId: SiteId,
  reportId: string,
  hold: 'share' | 'update' = 'share',
): Promise<ReportRow> {
  const row = await getReportInSite(tx, siteId, reportId, hold);
  if (row.state !== 'in-review') throw await stateConflict(tx, row);
  return row;
}
