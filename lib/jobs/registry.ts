import type { JobDefinition } from './job';
import type { JobName } from './names';
import { readReportJob } from './readReport/definition';
import { recheckEffectsJob } from './recheckEffects/definition';
import { sendMailJob } from './sendMail/definition';

type AnyJob = { [N in JobName]: JobDefinition<N> }[JobName];

export const JOB_DEFINITIONS: readonly AnyJob[] = [readReportJob, recheckEffectsJob, sendMailJob];
