import { and, desc, eq, inArray, type SQL, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { laboratory, report, reportSample } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import { LONG_WAIT_MS, type Report } from '@/lib/schemas/reports';
import { namesOf } from '../people/names';
import { STORE_DOWN } from './giveUpReading';

/** After this a report that nobody reads is worth a word: the worker may not be running. */
const MOST = 500;

type Row = { report: typeof report.$inferSelect; laboratoryName: string | null };
type Counts = Report['samples'];
const NO_SAMPLES: Counts = { all: 0, assigned: 0, plotIds: [] };

function toReport(
  { report: row, laboratoryName }: Row,
  names: Map<string, string>,
  samples: Counts,
  now: Date,
): Report {
  const who = (id: string) => ({ id, name: names.get(id) ?? 'somebody who has left' });
  const waits = row.state === 'received' && row.refusalCode === STORE_DOWN;
  const refused = row.state === 'unreadable' || row.state === 'not-soil' || waits;
  return {
    id: row.id,
    origin: row.origin,
    state: row.state,
    fileName: row.fileName,
    contentType: row.contentType,
    bytes: row.bytes,
    pages: row.pages,
    pagesRead: row.pagesRead,
    revision: row.revision,
    refusal:
      refused && row.refusalCode !== null ? { code: row.refusalCode, sentence: row.refusalSentence ?? '' } : null,
    warnings: row.warnings,
    laboratory: row.laboratoryId && laboratoryName ? { id: row.laboratoryId, name: laboratoryName } : null,
    laboratoryPrinted: row.laboratoryPrinted,
    droppedOnPlotId: row.droppedOnPlotId,
    uploadedBy: who(row.uploadedBy),
    uploadedAt: row.uploadedAt.toISOString(),
    confirmedBy: row.confirmedBy === null ? null : who(row.confirmedBy),
    confirmedAt: row.confirmedAt?.toISOString() ?? null,
    withdrawnReason: row.withdrawnReason,
    samples,
    version: row.version,
    waitingLong: row.state === 'received' && now.getTime() - row.uploadedAt.getTime() > LONG_WAIT_MS,
  };
}

async function countSamples(tx: Transaction, siteId: SiteId, ids: string[]): Promise<Map<string, Counts>> {
  if (ids.length === 0) return new Map();
  const rows = await tx
    .select({
      reportId: reportSample.reportId,
      all: sql<number>`count(*)::int`,
      assigned: sql<number>`count(${reportSample.plotId})::int`,
      plotIds: sql<
        string[]
      >`coalesce(array_agg(distinct ${reportSample.plotId}) filter (where ${reportSample.plotId} is not null), '{}')`,
    })
    .from(reportSample)
    .where(and(eq(reportSample.siteId, siteId), inArray(reportSample.reportId, ids)))
    .groupBy(reportSample.reportId);
  return new Map(rows.map(({ reportId, ...counts }) => [reportId, counts]));
}

export async function loadReports(tx: Transaction, siteId: SiteId, now: Date, only?: SQL): Promise<Report[]> {
  const rows = await tx
    .select({ report, laboratoryName: laboratory.name })
    .from(report)
    .leftJoin(laboratory, and(eq(laboratory.siteId, report.siteId), eq(laboratory.id, report.laboratoryId)))
    .where(and(eq(report.siteId, siteId), only))
    .orderBy(desc(report.uploadedAt), desc(report.id))
    .limit(MOST);
  const people = rows.flatMap((row) => [row.report.uploadedBy, row.report.confirmedBy ?? row.report.uploadedBy]);
  const names = await namesOf(tx, people);
  const counts = await countSamples(
    tx,
    siteId,
    rows.map((row) => row.report.id),
  );
  return rows.map((row) => toReport(row, names, counts.get(row.report.id) ?? NO_SAMPLES, now));
}
