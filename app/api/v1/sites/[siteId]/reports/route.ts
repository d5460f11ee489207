import { route } from '@/app/api/v1/_route';
import { listReports } from '@/lib/data/reports/listReports';
import { typeReport } from '@/lib/data/reports/typeReport';
import { reportListSchema, reportStateAnswerSchema } from '@/lib/schemas/reports';

export const GET = route({ verb: listReports, answer: reportListSchema, summary: 'Reports of a site, newest first' });
export const POST = route({
  verb: typeReport,
  answer: reportStateAnswerSchema,
  summary: 'Begin a report that is typed in',
  status: 201,
});
