import { route } from '@/app/api/v1/_route';
import { getReport } from '@/lib/data/reports/getReport';
import { setLaboratory } from '@/lib/data/reports/setLaboratory';
import { reportSchema, reportStateAnswerSchema } from '@/lib/schemas/reports';

export const GET = route({ verb: getReport, answer: reportSchema, summary: 'State and progress of a report' });
export const PATCH = route({
  verb: setLaboratory,
  answer: reportStateAnswerSchema,
  summary: 'Set the laboratory of a report in review',
});
