import { and, desc, eq, isNull, sql } from 'drizzle-orm';
import { failedJob, pageCopy, report } from '@/db/schema';
import type { FailedJob, FailedJobList } from '@/lib/schemas/failedJobs';
import { nothingSchema } from '@/lib/schemas/parts';
import { namesOf } from '../people/names';
import { siteVerb } from '../verb';

const MOST = 100;

type Row = {
  job: typeof failedJob.$inferSelect;
  reportState: typeof report.$inferSelect.state | null;
  copyState: typeof pageCopy.$inferSelect.state | null;
};

function notAgain({ job, reportState, copyState }: Row): string | null {
  if (job.replayedAt !== null) return 'It was asked for again already.';
  if (job.job === 'read-report' && reportState !== 'unreadable')
    return 'The report has moved on since: somebody read it again, typed it in or set it aside.';
  if (job.job === 'mask-page' && copyState !== 'failed') return 'This copy is not waited for any more.';
  return null;
}

/** What the worker gave up, still open first. */
export const listFailedJobs = siteVerb({
  act: 'site.manage',
  input: nothingSchema,
  run: async ({ tx, siteId }): Promise<FailedJobList> => {
    const rows = await tx
      .select({
        job: failedJob,
        reportId: report.id,
        fileName: report.fileName,
        reportState: report.state,
        copyState: pageCopy.state,
      })
      .from(failedJob)
      .leftJoin(pageCopy, and(eq(pageCopy.siteId, siteId), eq(pageCopy.id, failedJob.subjectId)))
      .leftJoin(
        report,
        and(eq(report.siteId, siteId), eq(report.id, sql`coalesce(${pageCopy.reportId}, ${failedJob.subjectId})`)),
      )
      .where(eq(failedJob.siteId, siteId))
      .orderBy(desc(isNull(failedJob.replayedAt)), desc(failedJob.gaveUpAt))
      .limit(MOST);
    const names = await namesOf(
      tx,
      rows.flatMap((row) => row.job.replayedBy ?? []),
    );
    const failedJobs = rows.map((row): FailedJob => {
      const { job, reportId, fileName } = row;
      const by = job.replayedBy === null ? '' : (names.get(job.replayedBy) ?? 'somebody who has left');
      return {
        id: job.id,
        job: job.job,
        subject:
          reportId === null
            ? { kind: 'other', id: job.subjectId, name: '' }
            : { kind: 'report', id: reportId, name: fileName ?? 'a report typed in' },
        sentence: job.sentence,
        gaveUpAt: job.gaveUpAt.toISOString(),
        notAgain: notAgain(row),
        replayed: job.replayedAt === null ? null : { at: job.replayedAt.toISOString(), by },
      };
    });
    return { failedJobs };
  },
});
