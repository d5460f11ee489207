import type { Transaction } from '@/db/client';
import type { SiteId } from '@/lib/domain/ids';
import { enqueue } from '../transaction';
import type { ReportRow } from './getReportInSite';
import { moveReport } from './moveReport';

/** unreadable or not-soil -> received, with the job that reads it. */
export async function backToReceived(tx: Transaction, siteId: SiteId, reportId: string): Promise<ReportRow> {
  const row = await moveReport(tx, siteId, reportId, ['unreadable', 'not-soil'], {
    state: 'received',
    readingStartedAt: null,
    refusalCode: null,
    refusalSentence: null,
    pagesRead: 0,
  });
  await enqueue(tx, 'read-report', { siteId, id: row.id });
  return row;
}
