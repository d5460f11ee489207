import { listResultsInput, type Result } from '@/lib/schemas/results';
import { getPlotInSite } from '../plots/getPlotInSite';
import { siteVerb } from '../verb';
import { loadResults, resultFilter } from './loadResults';

export const listResults = siteVerb({
  act: 'site.read',
  input: listResultsInput,
  run: async ({ tx, siteId, input }): Promise<{ results: Result[] }> => {
    if (input.plotId) await getPlotInSite(tx, siteId, input.plotId);
    return { results: await loadResults(tx, siteId, resultFilter(input)) };
  },
});
