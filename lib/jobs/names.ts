import { z } from 'zod';

/** A job's payload carries ids only; its handler reads the rows again and may find nothing left to do. */
export const JOBS = {
  'read-report': { payload: z.strictObject({ siteId: z.uuid(), id: z.uuid() }), expireInSeconds: 150, retryLimit: 3 },
  'send-mail': { payload: z.strictObject({ id: z.uuid() }), expireInSeconds: 60, retryLimit: 8 },
  'recheck-effects': {
    payload: z.strictObject({ siteId: z.uuid(), id: z.uuid() }),
    expireInSeconds: 60,
    retryLimit: 3,
  },
  /** `watch`: asked once more after a while, should the rest of the files never come. */
  'tell-batch': {
    payload: z.strictObject({ siteId: z.uuid(), id: z.uuid(), watch: z.boolean().optional() }),
    expireInSeconds: 60,
    retryLimit: 5,
  },
  'tell-report': {
    payload: z.strictObject({ siteId: z.uuid(), id: z.uuid() }),
    expireInSeconds: 60,
    retryLimit: 5,
  },
  'mask-page': { payload: z.strictObject({ siteId: z.uuid(), id: z.uuid() }), expireInSeconds: 150, retryLimit: 2 },
  'drop-copy': { payload: z.strictObject({ siteId: z.uuid(), id: z.uuid() }), expireInSeconds: 60, retryLimit: 8 },
  /** After a confirmation or its withdrawal: open reviews of the same layout or plots. */
  'recheck-reviews': {
    payload: z.strictObject({ siteId: z.uuid(), id: z.uuid() }),
    expireInSeconds: 120,
    retryLimit: 3,
  },
} as const;

export type JobName = keyof typeof JOBS;
export type JobPayload<N extends JobName> = z.infer<(typeof JOBS)[N]['payload']>;
export const JOB_NAMES = Object.keys(JOBS) as JobName[];
export const deadLetterOf = (name: JobName) => `${name}-dead`;
