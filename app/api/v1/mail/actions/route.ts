import { doMailAction, showMailActions } from '@/lib/data/reminders/mailActions';
import { doneAnswer, mailActionsAnswer } from '@/lib/schemas/reminders';
import { route } from '../../_route';

export const GET = route({
  verb: showMailActions,
  answer: mailActionsAnswer,
  summary: 'The reminders a letter carries',
});
export const POST = route({
  verb: doMailAction,
  answer: doneAnswer,
  summary: 'Snooze or close a reminder from its letter',
});
