import { getEffects } from '@/lib/data/effects/getEffects';
import { effectsAnswer } from '@/lib/schemas/effects';
import { route } from '../../../_route';

export const GET = route({
  verb: getEffects,
  answer: effectsAnswer,
  summary: 'Effect checks of a plot or of the whole site',
});
