import { route } from '@/app/api/v1/_route';
import { replayFailedJob } from '@/lib/data/failedJobs/replayFailedJob';
import { replayAnswerSchema } from '@/lib/schemas/failedJobs';

export const POST = route({
  verb: replayFailedJob,
  answer: replayAnswerSchema,
  summary: 'Have a task that was given up done again',
});
