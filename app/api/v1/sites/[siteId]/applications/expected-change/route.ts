import { suggestChange } from '@/lib/data/applications/suggestChange';
import { suggestChangeAnswer } from '@/lib/schemas/applications';
import { route } from '../../../../_route';

export const GET = route({
  verb: suggestChange,
  answer: suggestChangeAnswer,
  summary: 'What an amount can be expected to change here, by published rules',
});
