import { snoozeReminder } from '@/lib/data/reminders/snoozeReminder';
import { doneAnswer } from '@/lib/schemas/reminders';
import { route } from '../../../../../_route';

export const POST = route({
  verb: snoozeReminder,
  answer: doneAnswer,
  summary: 'Rest from a reminder until a day, for yourself',
});
