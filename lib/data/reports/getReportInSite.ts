import { and, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { report } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import { notFound } from '@/lib/errors';

export type ReportRow = typeof report.$inferSelect;

/** `hold` keeps the row until the transaction ends: 'share' beside other editors, 'update' alone. */
export async function getReportInSite(
  tx: Transaction,
  siteId: SiteId,
  reportId: string,
  hold?: 'share' | 'update',
): Promise<ReportRow> {
  const query = tx
    .select()
    .from(report)
    .where(and(eq(report.siteId, siteId), eq(report.id, reportId)));
  const rows = hold ? await query.for(hold) : await query;
  const row = rows[0];
  if (!row) throw notFound();
  return row;
}
