import { route } from '@/app/api/v1/_route';
import { listFailedJobs } from '@/lib/data/failedJobs/listFailedJobs';
import { failedJobListSchema } from '@/lib/schemas/failedJobs';

export const GET = route({ verb: listFailedJobs, answer: failedJobListSchema, summary: 'Tasks that were given up' });
