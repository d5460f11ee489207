import { listPlotsInput, type PlotList } from '@/lib/schemas/plots';
import { siteVerb } from '../verb';
import { loadPlots } from './loadPlots';
import { yearOf } from './plotNow';

export const listPlots = siteVerb({
  act: 'site.read',
  input: listPlotsInput,
  run: async ({ ctx, tx, siteId, person, input }): Promise<PlotList> => {
    const year = yearOf(ctx, person);
    return { plots: await loadPlots(tx, siteId, year, input.archived === 'yes'), year };
  },
});
