import { route } from '@/app/api/v1/_route';
import { getCopy } from '@/lib/data/copies/getCopy';
import { throwAwayCopy } from '@/lib/data/copies/throwAwayCopy';
import { copySchema } from '@/lib/schemas/copies';

export const GET = route({ verb: getCopy, answer: copySchema, summary: 'How far a blacked-out copy is' });
export const DELETE = route({ verb: throwAwayCopy, answer: copySchema, summary: 'Throw a blacked-out copy away' });
