import { and, asc, eq, inArray } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { report, reportSample } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';

/** Keeps the reports of these samples in their state until the transaction ends: none is withdrawn under whoever counts on it. */
export async function holdReportsOf(tx: Transaction, siteId: SiteId, sampleIds: readonly string[]): Promise<void> {
  if (sampleIds.length === 0) return;
  await tx
    .select({ id: report.id })
    .from(report)
    .where(
      and(
        eq(report.siteId, siteId),
        inArray(
          report.id,
          tx
            .select({ id: reportSample.reportId })
            .from(reportSample)
            .where(and(eq(reportSample.siteId, siteId), inArray(reportSample.id, [...sampleIds]))),
        ),
      ),
    )
    .orderBy(asc(report.id))
    .for('share');
}
