import { route } from '@/app/api/v1/_route';
import { withdrawReport } from '@/lib/data/results/withdrawReport';
import { reportStateAnswerSchema } from '@/lib/schemas/reports';

export const POST = route({
  verb: withdrawReport,
  answer: reportStateAnswerSchema,
  summary: 'Withdraw a confirmation with a reason',
});
