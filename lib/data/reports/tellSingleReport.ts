import { and, asc, eq, isNull, ne, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { plot, readingRow, report, reportSample } from '@/db/schema';
import { asDay, dayInWords } from '@/lib/domain/days';
import type { SiteId } from '@/lib/domain/ids';
import type { Ctx } from '../context';
import { queueReportReady } from '../mail/queueReady';
import { isMember } from '../sites/isMember';

/** Below this the reader itself asks for a second look. */
const SURE = 0.95;

/** A report sent by itself has been read, or could not be: whoever sent it is written to if they wished so. */
export async function tellSingleReport(tx: Transaction, ctx: Ctx, siteId: SiteId, reportId: string): Promise<void> {
  const [row] = await tx
    .select()
    .from(report)
    .where(and(eq(report.siteId, siteId), eq(report.id, reportId)));
  if (!row || !['in-review', 'unreadable', 'not-soil'].includes(row.state)) return;
  if (!(await isMember(tx, siteId, row.uploadedBy))) return;
  const samples = await tx
    .select({ plotName: plot.name, takenOn: reportSample.takenOn })
    .from(reportSample)
    .leftJoin(plot, and(eq(plot.siteId, siteId), eq(plot.id, reportSample.plotId)))
    .where(and(eq(reportSample.siteId, siteId), eq(reportSample.reportId, row.id), isNull(reportSample.leftOutReason)))
    .orderBy(asc(reportSample.ordinal));
  const [counts] = await tx
    .select({
      values: sql<number>`count(*)::int`,
      doubtful: sql<number>`(count(*) filter (where jsonb_array_length(${readingRow.doubts}) > 0 or ${readingRow.confidence} < ${SURE}))::int`,
    })
    .from(readingRow)
    .where(and(eq(readingRow.siteId, siteId), eq(readingRow.reportId, row.id), ne(readingRow.state, 'removed')));
  const days = [...new Set(samples.flatMap((one) => one.takenOn ?? []))];
  const [day] = days;
  await queueReportReady(tx, ctx, siteId, {
    reportId: row.id,
    personId: row.uploadedBy,
    fileName: row.fileName ?? 'a report',
    plotNames: [...new Set(samples.flatMap((one) => one.plotName ?? []))],
    sampledOn: day !== undefined && days.length === 1 ? dayInWords(asDay(day)) : null,
    outcome:
      row.state === 'in-review'
        ? { kind: 'read', values: counts?.values ?? 0, doubtful: counts?.doubtful ?? 0 }
        : { kind: 'not-read', sentence: row.refusalSentence ?? '' },
  });
}
