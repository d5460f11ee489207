import { dropCopyJob } from './dropCopy/definition';
import type { JobDefinition } from './job';
import { maskPageJob } from './maskPage/definition';
import type { JobName } from './names';
import { readReportJob } from './readReport/definition';
import { recheckEffectsJob } from './recheckEffects/definition';
import { recheckReviewsJob } from './recheckReviews/definition';
import { sendMailJob } from './sendMail/definition';
import { tellBatchJob } from './tellBatch/definition';
import { tellReportJob } from './tellReport/definition';

type AnyJob = { [N in JobName]: JobDefinition<N> }[JobName];

export const JOB_DEFINITIONS: readonly AnyJob[] = [
  readReportJob,
  recheckEffectsJob,
  recheckReviewsJob,
  sendMailJob,
  tellBatchJob,
  tellReportJob,
  maskPageJob,
  dropCopyJob,
];
