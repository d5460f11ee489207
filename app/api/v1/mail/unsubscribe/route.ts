import { unsubscribe } from '@/lib/data/mail/unsubscribe';
import { doneAnswer } from '@/lib/schemas/reminders';
import { doorRoute } from '../../_door';

export const POST = doorRoute({
  verb: unsubscribe,
  answer: doneAnswer,
  summary: 'End one kind of mail, from the letter itself',
});
