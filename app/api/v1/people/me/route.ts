import { getMe } from '@/lib/data/people/getMe';
import { updateMe } from '@/lib/data/people/updateMe';
import { meSchema } from '@/lib/schemas/people';
import { route } from '../../_route';

export const GET = route({
  verb: getMe,
  answer: meSchema,
  summary: 'The signed-in person and their settings',
});

export const PATCH = route({
  verb: updateMe,
  answer: meSchema,
  summary: 'Change own settings',
});
