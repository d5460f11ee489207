import { listApplications } from '@/lib/data/applications/listApplications';
import { recordApplication } from '@/lib/data/applications/recordApplication';
import { createdAnswer } from '@/lib/schemas/answers';
import { applicationsAnswer } from '@/lib/schemas/applications';
import { route } from '../../../_route';

export const GET = route({
  verb: listApplications,
  answer: applicationsAnswer,
  summary: 'What was spread, oldest first',
});
export const POST = route({
  verb: recordApplication,
  answer: createdAnswer,
  status: 201,
  summary: 'Record what was spread and what it was meant to do',
});
