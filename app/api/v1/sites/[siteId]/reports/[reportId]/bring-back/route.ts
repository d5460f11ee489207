import { route } from '@/app/api/v1/_route';
import { bringBack } from '@/lib/data/reports/bringBack';
import { reportStateAnswerSchema } from '@/lib/schemas/reports';

export const POST = route({
  verb: bringBack,
  answer: reportStateAnswerSchema,
  summary: 'Bring a report back that was set aside',
});
