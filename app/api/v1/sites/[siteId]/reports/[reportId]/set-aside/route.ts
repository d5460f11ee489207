import { route } from '@/app/api/v1/_route';
import { setAside } from '@/lib/data/reports/setAside';
import { reportStateAnswerSchema } from '@/lib/schemas/reports';

export const POST = route({
  verb: setAside,
  answer: reportStateAnswerSchema,
  summary: 'Set an unconfirmed report aside',
});
