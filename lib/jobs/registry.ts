import type { JobDefinition, JobTools } from './job';
import type { JobName } from './names';
import { sendMailJob } from './sendMail/definition';

type AnyJob = { [N in JobName]: JobDefinition<N> }[JobName];

export const JOB_DEFINITIONS: readonly AnyJob[] = [sendMailJob];
export type { JobTools };
