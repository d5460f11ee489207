import { route } from '@/app/api/v1/_route';
import { setPlanting } from '@/lib/data/plots/setPlanting';
import { unsetPlanting } from '@/lib/data/plots/unsetPlanting';
import { plotSchema } from '@/lib/schemas/plots';

export const PUT = route({ verb: setPlanting, answer: plotSchema, summary: 'Set the crop of a year' });
export const DELETE = route({ verb: unsetPlanting, answer: plotSchema, summary: 'Take the crop of a year away' });
