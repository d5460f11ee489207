import { route } from '@/app/api/v1/_route';
import { createTargetSet } from '@/lib/data/targets/createTargetSet';
import { listTargets } from '@/lib/data/targets/listTargets';
import { ownTargetSetSchema, targetListSchema } from '@/lib/schemas/targets';

export const GET = route({
  verb: listTargets,
  answer: targetListSchema,
  summary: 'Built-in target sets and the site’s own',
});
export const POST = route({
  verb: createTargetSet,
  answer: ownTargetSetSchema,
  summary: 'Make a target set',
  status: 201,
});
