import type { JobDefinition } from '../job';
import { sendQueuedMail } from './handler';

export const sendMailJob: JobDefinition<'send-mail'> = { name: 'send-mail', concurrency: 2, handle: sendQueuedMail };
