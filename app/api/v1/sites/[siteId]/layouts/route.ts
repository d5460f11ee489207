import { route } from '@/app/api/v1/_route';
import { listLayouts } from '@/lib/data/learning/listLayouts';
import { layoutListSchema } from '@/lib/schemas/learning';

export const GET = route({
  verb: listLayouts,
  answer: layoutListSchema,
  summary: 'What confirmed reviews taught, layout by layout',
});
