import { route } from '@/app/api/v1/_route';
import { createLaboratory } from '@/lib/data/laboratories/createLaboratory';
import { listLaboratories } from '@/lib/data/laboratories/listLaboratories';
import { laboratoryListSchema, laboratorySchema } from '@/lib/schemas/reports';

export const GET = route({ verb: listLaboratories, answer: laboratoryListSchema, summary: 'Laboratories of a site' });
export const POST = route({
  verb: createLaboratory,
  answer: laboratorySchema,
  summary: 'Add a laboratory',
  status: 201,
});
