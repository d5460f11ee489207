import { getToday } from '@/lib/data/today/getToday';
import { todayAnswer } from '@/lib/schemas/today';
import { route } from '../_route';

export const GET = route({
  verb: getToday,
  answer: todayAnswer,
  summary: 'What is due on all your sites, what waits, and the newest verdicts',
});
