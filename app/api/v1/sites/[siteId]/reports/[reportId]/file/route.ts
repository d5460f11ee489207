import { z } from 'zod';
import { fileResponse } from '@/app/api/v1/_file';
import { route } from '@/app/api/v1/_route';
import { getReportFile } from '@/lib/data/reports/getReportFile';

export const GET = route({
  verb: getReportFile,
  answer: z.unknown(),
  summary: 'The original file of a report',
  respond: fileResponse,
});
