import { route } from '@/app/api/v1/_route';
import { updateLaboratory } from '@/lib/data/laboratories/updateLaboratory';
import { laboratorySchema } from '@/lib/schemas/reports';

export const PATCH = route({
  verb: updateLaboratory,
  answer: laboratorySchema,
  summary: 'Rename a laboratory or list its other spellings',
});
