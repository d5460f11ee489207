import { z } from 'zod';
import { idSchema, momentSchema } from './parts';

export const failedJobInput = z.strictObject({ failedJobId: idSchema });

export const failedJobSchema = z.object({
  id: z.string(),
  job: z.string(),
  /** What the job was about, by the name a person knows it by. */
  subject: z.object({ kind: z.enum(['report', 'other']), id: z.string(), name: z.string() }),
  /** What happened, what was kept, what to do next. */
  sentence: z.string(),
  gaveUpAt: momentSchema,
  /** Why asking for it again would do nothing; null while it may be asked for. */
  notAgain: z.string().nullable(),
  replayed: z.object({ at: momentSchema, by: z.string() }).nullable(),
});
export const failedJobListSchema = z.object({ failedJobs: z.array(failedJobSchema) });
export const replayAnswerSchema = z.object({ id: z.string(), job: z.string(), replayedAt: momentSchema });

export type FailedJob = z.infer<typeof failedJobSchema>;
export type FailedJobList = z.infer<typeof failedJobListSchema>;
