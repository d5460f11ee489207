import { env } from '@/lib/env';
import { prepareQueue } from '@/lib/services/queue/queue';
import { deadLetterOf, JOB_NAMES, JOBS } from '../names';

const ownerUrl = env().DATABASE_OWNER_URL;
if (!ownerUrl) throw new Error('DATABASE_OWNER_URL is not set: the queue is prepared as the owner of the database.');
const queues = JOB_NAMES.map((name) => ({
  name,
  deadLetter: deadLetterOf(name),
  expireInSeconds: JOBS[name].expireInSeconds,
  retryLimit: JOBS[name].retryLimit,
}));
await prepareQueue(ownerUrl, queues, 'loamline_app');
