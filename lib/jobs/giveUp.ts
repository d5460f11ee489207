import { giveUpJob } from '@/lib/data/failedJobs/giveUpJob';
import type { JobTools } from './job';
import type { JobName } from './names';

/** Jobs of a site: their payload says which one. */
type SiteJob = Exclude<JobName, 'send-mail'>;

/** The last try failed: an owner finds it among what was given up, with this sentence. */
export const giveUpWith =
  <N extends SiteJob>(job: N, sentence: string) =>
  ({ ctx, payload: { siteId, id } }: JobTools<N>): Promise<void> =>
    giveUpJob({ ctx, input: { siteId, id, job, sentence } });
