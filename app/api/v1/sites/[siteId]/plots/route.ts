import { route } from '@/app/api/v1/_route';
import { createPlot } from '@/lib/data/plots/createPlot';
import { listPlots } from '@/lib/data/plots/listPlots';
import { plotListSchema, plotSchema } from '@/lib/schemas/plots';

export const GET = route({
  verb: listPlots,
  answer: plotListSchema,
  summary: 'Plots of a site with area, crop of the year and last test',
});
export const POST = route({ verb: createPlot, answer: plotSchema, summary: 'Add a plot', status: 201 });
