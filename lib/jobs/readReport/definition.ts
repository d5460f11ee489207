import type { JobDefinition } from '../job';
import { readFile } from '../readFile/readFile';
import { giveUpReport, readReportWith } from './handler';

export const readReportJob: JobDefinition<'read-report'> = {
  name: 'read-report',
  concurrency: 3,
  handle: readReportWith(readFile),
  giveUp: giveUpReport,
};
