import { and, count, desc, eq, inArray, isNull, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { plot, report, reportSample, site } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import { notFound } from '@/lib/errors';
import { nothingSchema } from '@/lib/schemas/parts';
import { LONG_WAIT_MS } from '@/lib/schemas/reports';
import type { TodayReport, TodaySite } from '@/lib/schemas/today';
import { isOpenBatch, loadBatches } from '../batches/loadBatches';
import { openDue } from '../reminders/openDue';
import { siteVerb } from '../verb';
import { newestVerdicts } from './newestVerdicts';

/** From a month before its day a reminder stands on the first page; the first letter leaves two weeks before. */
const SHOWN_FROM_DAYS = 30;
const REPORTS_SHOWN = 5;
const BATCHES_LOOKED_AT = 5;
const WAITING = ['in-review', 'unreadable', 'not-soil', 'received', 'reading'] as const;

async function waitingReports(tx: Transaction, siteId: SiteId, now: Date): Promise<TodayReport[]> {
  const rows = await tx
    .select({
      id: report.id,
      fileName: report.fileName,
      state: report.state,
      uploadedAt: report.uploadedAt,
      pages: report.pages,
      pagesRead: report.pagesRead,
      refusal: report.refusalSentence,
      samples: count(reportSample.id),
    })
    .from(report)
    .leftJoin(reportSample, and(eq(reportSample.siteId, siteId), eq(reportSample.reportId, report.id)))
    .where(and(eq(report.siteId, siteId), inArray(report.state, [...WAITING])))
    .groupBy(report.siteId, report.id)
    .orderBy(
      sql`case ${report.state} when 'in-review' then 0 when 'unreadable' then 1 when 'not-soil' then 1 else 2 end`,
      desc(report.uploadedAt),
    )
    .limit(REPORTS_SHOWN);
  return rows.map(({ uploadedAt, refusal, ...row }) => ({
    ...row,
    uploadedAt: uploadedAt.toISOString(),
    refusal: row.state === 'unreadable' || row.state === 'not-soil' ? refusal : null,
    waitingLong: row.state === 'received' && now.getTime() - uploadedAt.getTime() > LONG_WAIT_MS,
  }));
}

async function reportCounts(tx: Transaction, siteId: SiteId) {
  const rows = await tx
    .select({ state: report.state, n: count() })
    .from(report)
    .where(eq(report.siteId, siteId))
    .groupBy(report.state);
  const of = (states: readonly string[]) =>
    rows.filter((row) => states.includes(row.state)).reduce((sum, row) => sum + row.n, 0);
  return { confirmed: of(['confirmed']), waiting: of(WAITING) };
}

/** What one site asks of the person who looks today. */
export const getSiteToday = siteVerb({
  act: 'site.read',
  input: nothingSchema,
  run: async ({ ctx, tx, siteId, person, role }): Promise<TodaySite> => {
    const [here] = await tx.select({ id: site.id, name: site.name }).from(site).where(eq(site.id, siteId));
    if (!here) throw notFound();
    const [plots] = await tx
      .select({ n: count() })
      .from(plot)
      .where(and(eq(plot.siteId, siteId), isNull(plot.archivedAt)));
    const { due: all } = await openDue({ ctx, tx, siteId, person, role });
    const reports = await waitingReports(tx, siteId, ctx.now);
    const counts = await reportCounts(tx, siteId);
    return {
      ...here,
      role,
      plots: plots?.n ?? 0,
      confirmed: counts.confirmed,
      due: all.filter((one) => one.inDays <= SHOWN_FROM_DAYS),
      next: all.find((one) => one.inDays > SHOWN_FROM_DAYS) ?? null,
      reports,
      moreReports: Math.max(0, counts.waiting - reports.length),
      batches: (await loadBatches(tx, siteId, BATCHES_LOOKED_AT)).filter(isOpenBatch),
      verdicts: await newestVerdicts(tx, siteId, ctx.now),
    };
  },
});
