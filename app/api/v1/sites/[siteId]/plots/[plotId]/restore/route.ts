import { route } from '@/app/api/v1/_route';
import { restorePlot } from '@/lib/data/plots/restorePlot';
import { plotSchema } from '@/lib/schemas/plots';

export const POST = route({ verb: restorePlot, answer: plotSchema, summary: 'Bring an archived plot back' });
