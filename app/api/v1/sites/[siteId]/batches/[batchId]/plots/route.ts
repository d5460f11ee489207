import { route } from '@/app/api/v1/_route';
import { assignPlots } from '@/lib/data/batches/assignPlots';
import { plotOutcomesSchema } from '@/lib/schemas/batches';

export const PATCH = route({
  verb: assignPlots,
  answer: plotOutcomesSchema,
  summary: 'Set the plots of many samples at once',
});
