import { z } from 'zod';
import { report } from '@/db/schema';
import { asSiteId } from '@/lib/domain/ids';
import { withSite } from '../transaction';
import { workerVerb } from '../verb';
import { held, leaseSchema } from './lease';

/** reading -> received: this try failed and the next one may begin at once. What went wrong is kept for when none is left. */
export const releaseReading = workerVerb({
  input: z.strictObject({ lease: leaseSchema, code: z.string(), sentence: z.string() }),
  run: ({ input }): Promise<void> =>
    withSite(asSiteId(input.lease.siteId), async (tx) => {
      await tx
        .update(report)
        .set({ state: 'received', refusalCode: input.code, refusalSentence: input.sentence })
        .where(held(input.lease));
    }),
});
