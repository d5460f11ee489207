import { listRules } from '@/lib/data/reminders/listRules';
import { setRule } from '@/lib/data/reminders/setRule';
import { createdAnswer } from '@/lib/schemas/answers';
import { rulesAnswer } from '@/lib/schemas/reminders';
import { route } from '../../../../_route';

export const GET = route({ verb: listRules, answer: rulesAnswer, summary: 'Reminder rules of every plot' });
export const PUT = route({
  verb: setRule,
  answer: createdAnswer,
  summary: 'Switch a reminder rule of a plot on or off',
});
