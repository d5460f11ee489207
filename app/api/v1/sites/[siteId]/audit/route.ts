import { listAudit } from '@/lib/data/sites/listAudit';
import { auditListSchema } from '@/lib/schemas/sites';
import { route } from '../../../_route';

export const GET = route({
  verb: listAudit,
  answer: auditListSchema,
  summary: 'What was done on a site, newest first',
});
