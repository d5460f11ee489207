import { and, eq, isNull } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { failedJob, pageCopy } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import { notFound, Problem } from '@/lib/errors';
import { JOB_NAMES, type JobName } from '@/lib/jobs/names';
import { failedJobInput } from '@/lib/schemas/failedJobs';
import { backToReceived } from '../reports/backToReceived';
import { enqueue } from '../transaction';
import { siteVerb } from '../verb';

type Row = typeof failedJob.$inferSelect;

/** Jobs whose payload is a site and the id of what they are about. */
type SiteJob = Exclude<JobName, 'send-mail'>;
const isSiteJob = (name: string): name is SiteJob => name !== 'send-mail' && JOB_NAMES.some((one) => one === name);

/** What the subject must be brought back to before the job may run again, and the job itself. */
async function askAgain(tx: Transaction, siteId: SiteId, { job, subjectId: id }: Row): Promise<void> {
  switch (job) {
    case 'read-report':
      await backToReceived(tx, siteId, id);
      return;
    case 'mask-page': {
      const rows = await tx
        .update(pageCopy)
        .set({ state: 'asked', sentence: null, startedAt: null })
        .where(and(eq(pageCopy.siteId, siteId), eq(pageCopy.id, id), eq(pageCopy.state, 'failed')))
        .returning({ id: pageCopy.id });
      if (rows.length === 0)
        throw new Problem('conflict', 'This copy is not waited for any more.', { reason: 'moved-on' });
      return enqueue(tx, 'mask-page', { siteId, id });
    }
    default:
      if (!isSiteJob(job))
        throw new Problem('conflict', 'This kind of task is not asked for again from here.', {
          reason: 'not-replayed',
        });
      return enqueue(tx, job, { siteId, id });
  }
}

/** A job that was given up runs once more. Of two owners, or two clicks, one asks and the other is told. */
export const replayFailedJob = siteVerb({
  act: 'site.manage',
  input: failedJobInput,
  run: async ({ ctx, tx, siteId, person, input, audit }) => {
    const here = and(eq(failedJob.siteId, siteId), eq(failedJob.id, input.failedJobId));
    const [row] = await tx
      .update(failedJob)
      .set({ replayedAt: ctx.now, replayedBy: person.id })
      .where(and(here, isNull(failedJob.replayedAt)))
      .returning();
    if (!row) {
      const [known] = await tx.select({ id: failedJob.id }).from(failedJob).where(here);
      if (!known) throw notFound();
      throw new Problem('conflict', 'This was asked for again already.', { reason: 'replayed' });
    }
    await askAgain(tx, siteId, row);
    await audit({
      act: 'job.replay',
      objectKind: 'job',
      objectId: row.id,
      detail: { job: row.job, subjectId: row.subjectId },
    });
    return { id: row.id, job: row.job, replayedAt: ctx.now.toISOString() };
  },
});
