import { compareResults } from '@/lib/data/history/compareResults';
import { compareAnswer } from '@/lib/schemas/effects';
import { route } from '../../../_route';

export const GET = route({
  verb: compareResults,
  answer: compareAnswer,
  summary: 'Two results side by side, with the interval of their difference',
});
