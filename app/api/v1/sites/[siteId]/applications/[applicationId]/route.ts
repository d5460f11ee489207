import { correctApplication } from '@/lib/data/applications/correctApplication';
import { removeApplication } from '@/lib/data/applications/removeApplication';
import { createdAnswer } from '@/lib/schemas/answers';
import { route } from '../../../../_route';

export const PUT = route({
  verb: correctApplication,
  answer: createdAnswer,
  summary: 'Correct a record; the old one is kept',
});
export const DELETE = route({
  verb: removeApplication,
  answer: createdAnswer,
  summary: 'Take a record out of the history, with a reason',
});
