import type { Transaction } from '@/db/client';
import { failedJob } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import type { JobName } from '@/lib/jobs/names';
import type { Ctx } from '../context';

/** Keeps what was given up for the owner's eyes; while it stands open, the same job given up again adds nothing. */
export async function noteFailedJob(
  tx: Transaction,
  ctx: Ctx,
  siteId: SiteId,
  failed: { job: JobName; subjectId: string; code: string; sentence: string },
): Promise<boolean> {
  const rows = await tx
    .insert(failedJob)
    .values({ siteId, ...failed, gaveUpAt: ctx.now })
    .onConflictDoNothing()
    .returning({ id: failedJob.id });
  return rows.length > 0;
}
