import { z } from 'zod';
import { asSiteId } from '@/lib/domain/ids';
import { JOB_NAMES } from '@/lib/jobs/names';
import { idSchema } from '@/lib/schemas/parts';
import { audit } from '../audit';
import { withSite } from '../transaction';
import { workerVerb } from '../verb';
import { noteFailedJob } from './noteFailedJob';

/** No try is left for a job that has no row of its own to say so. */
export const giveUpJob = workerVerb({
  input: z.strictObject({ siteId: idSchema, id: idSchema, job: z.enum(JOB_NAMES), sentence: z.string().min(1) }),
  run: ({ ctx, input }): Promise<void> => {
    const siteId = asSiteId(input.siteId);
    return withSite(siteId, async (tx) => {
      const { job, id: subjectId, sentence } = input;
      const noted = await noteFailedJob(tx, ctx, siteId, { job, subjectId, code: 'job-failed', sentence });
      if (noted)
        await audit(tx, ctx, siteId, { act: 'job.give-up', objectKind: 'job', objectId: subjectId, detail: { job } });
    });
  },
});
