import { z } from 'zod';
import { report } from '@/db/schema';
import { asSiteId } from '@/lib/domain/ids';
import { withSite } from '../transaction';
import { workerVerb } from '../verb';
import { held, leaseSchema } from './lease';

/** "Reading page 2 of 3". */
export const noteProgress = workerVerb({
  input: z.strictObject({ lease: leaseSchema, page: z.number().int().min(0), pages: z.number().int().min(0) }),
  run: ({ input }): Promise<void> =>
    withSite(asSiteId(input.lease.siteId), async (tx) => {
      await tx.update(report).set({ pagesRead: input.page, pages: input.pages }).where(held(input.lease));
    }),
});
