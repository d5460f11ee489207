import { route } from '@/app/api/v1/_route';
import { takeByHand } from '@/lib/data/reports/takeByHand';
import { reportStateAnswerSchema } from '@/lib/schemas/reports';

export const POST = route({
  verb: takeByHand,
  answer: reportStateAnswerSchema,
  summary: 'Type in what could not be read',
});
