import { tellReport } from '@/lib/data/batches/tellBatch';
import { giveUpWith } from '../giveUp';
import type { JobDefinition } from '../job';

export const tellReportJob: JobDefinition<'tell-report'> = {
  name: 'tell-report',
  concurrency: 1,
  handle: ({ ctx, payload }) => tellReport({ ctx, input: payload }),
  giveUp: giveUpWith(
    'tell-report',
    'The report has been read, but whoever sent it could not be told by mail. It stands in the list of reports.',
  ),
};
