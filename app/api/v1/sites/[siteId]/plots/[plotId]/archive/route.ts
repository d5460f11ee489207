import { route } from '@/app/api/v1/_route';
import { archivePlot } from '@/lib/data/plots/archivePlot';
import { plotSchema } from '@/lib/schemas/plots';

export const POST = route({ verb: archivePlot, answer: plotSchema, summary: 'Archive a plot; its history stays' });
