import { route } from '@/app/api/v1/_route';
import { getPlot } from '@/lib/data/plots/getPlot';
import { updatePlot } from '@/lib/data/plots/updatePlot';
import { plotDetailSchema, plotSchema } from '@/lib/schemas/plots';

export const GET = route({ verb: getPlot, answer: plotDetailSchema, summary: 'One plot with its plantings' });
export const PATCH = route({ verb: updatePlot, answer: plotSchema, summary: 'Change a plot' });
