import { sql } from 'drizzle-orm';
import { plot, result } from '@/db/schema';
import { latestResultsInput, type Result } from '@/lib/schemas/results';
import { getPlotInSite } from '../plots/getPlotInSite';
import { siteVerb } from '../verb';
import { loadResults } from './loadResults';

/** Of every live plot, or of one, all results of its newest day for each analyte. */
export const latestResults = siteVerb({
  act: 'site.read',
  input: latestResultsInput,
  run: async ({ tx, siteId, input }): Promise<{ results: Result[] }> => {
    if (input.plotId) await getPlotInSite(tx, siteId, input.plotId);
    const ofPlot = input.plotId
      ? sql`r.plot_id = ${input.plotId}`
      : sql`r.plot_id in (select p.id from ${plot} p where p.site_id = ${siteId} and p.archived_at is null)`;
    const newest = sql`${result.id} in (
      select ranked.id from (
        select r.id, rank() over (partition by r.plot_id, r.analyte order by r.taken_on desc) as place from ${result} r
        where r.site_id = ${siteId} and r.superseded_at is null and ${ofPlot}) ranked
      where ranked.place = 1)`;
    return { results: await loadResults(tx, siteId, newest) };
  },
});
