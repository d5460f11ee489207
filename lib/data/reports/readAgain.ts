import { and, eq, isNull } from 'drizzle-orm';
import { failedJob } from '@/db/schema';
import { reportInput } from '@/lib/schemas/reports';
import { siteVerb } from '../verb';
import { backToReceived } from './backToReceived';
import { type StateAnswer, stateAnswer } from './reportAnswer';

/** Another try for a file that gave nothing: the store was down, or the reader has learnt since. */
export const readAgain = siteVerb({
  act: 'reading.decide',
  input: reportInput,
  run: async ({ ctx, tx, siteId, person, input, audit }): Promise<StateAnswer> => {
    const row = await backToReceived(tx, siteId, input.reportId);
    // What was given up for it is asked for again by this, and not a second time from the owner's list.
    await tx
      .update(failedJob)
      .set({ replayedAt: ctx.now, replayedBy: person.id })
      .where(
        and(
          eq(failedJob.siteId, siteId),
          eq(failedJob.job, 'read-report'),
          eq(failedJob.subjectId, row.id),
          isNull(failedJob.replayedAt),
        ),
      );
    await audit({ act: 'report.read-again', objectKind: 'report', objectId: row.id });
    return stateAnswer(row);
  },
});
