import { route } from '@/app/api/v1/_route';
import { editTargetSet } from '@/lib/data/targets/editTargetSet';
import { ownTargetSetSchema } from '@/lib/schemas/targets';

export const PUT = route({
  verb: editTargetSet,
  answer: ownTargetSetSchema,
  summary: 'Save a new version of a target set',
});
