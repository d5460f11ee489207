import { getHistory } from '@/lib/data/history/getHistory';
import { historyAnswer } from '@/lib/schemas/history';
import { route } from '../../../../../_route';

export const GET = route({
  verb: getHistory,
  answer: historyAnswer,
  summary: 'Every analyte of a plot over the years, with bands, breaks and amendments',
});
