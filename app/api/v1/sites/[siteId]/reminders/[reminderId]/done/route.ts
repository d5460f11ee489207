import { closeReminder } from '@/lib/data/reminders/closeReminder';
import { doneAnswer } from '@/lib/schemas/reminders';
import { route } from '../../../../../_route';

export const POST = route({
  verb: closeReminder,
  answer: doneAnswer,
  summary: 'Already sampled: close a reminder for everybody',
});
