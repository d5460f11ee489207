import type { Ctx } from '@/lib/data/context';
import type { JobName, JobPayload } from './names';

export type JobTools<N extends JobName> = { ctx: Ctx; payload: JobPayload<N>; signal: AbortSignal };

export type JobDefinition<N extends JobName = JobName> = {
  name: N;
  /** How many of this kind one worker runs at a time. */
  concurrency: number;
  handle: (tools: JobTools<N>) => Promise<void>;
  /** Called with the last failure's payload once no retry is left, so that no row stays in a state that waits for ever. */
  giveUp?: (tools: JobTools<N>) => Promise<void>;
};
