import { listDue } from '@/lib/data/reminders/listDue';
import { dueListAnswer } from '@/lib/schemas/reminders';
import { route } from '../../../_route';

export const GET = route({ verb: listDue, answer: dueListAnswer, summary: 'Open reminders of a site' });
