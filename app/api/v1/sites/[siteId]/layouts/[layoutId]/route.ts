import { route } from '@/app/api/v1/_route';
import { forgetLayout } from '@/lib/data/learning/forgetLayout';
import { forgottenLayoutSchema } from '@/lib/schemas/learning';

export const DELETE = route({
  verb: forgetLayout,
  answer: forgottenLayoutSchema,
  summary: 'Forget everything learnt of one layout',
});
