import { orNotFound } from '@/app/_server/context';
import { compareResults } from '@/lib/data/history/compareResults';
import { listPlots } from '@/lib/data/plots/listPlots';
import { listResults } from '@/lib/data/results/listResults';
import { ANALYTES } from '@/lib/domain/analytes';
import { shortLabel } from '../../_components/history-props';
import { openPlot } from '../../_server/open-plot';
import { type Asked, type Choice, pairFor, presetsFor, testsOf } from '../_components/choice';

export async function loadComparison(siteId: string, plotId: string, asked: Asked) {
  const { ctx, site } = await openPlot(siteId, plotId);
  const here = await orNotFound(listResults({ ctx, input: { siteId, plotId } }));
  const measured = new Set(here.results.map((row) => row.analyte));
  const analytes = ANALYTES.filter(({ key }) => measured.has(key)).map(({ key, label }) => ({
    key,
    label: shortLabel(key, label),
  }));
  const usual = analytes.find(({ key }) => key === 'soil_ph_water') ?? analytes[0];
  const analyte = analytes.find(({ key }) => key === asked.analyte) ?? usual;
  if (analyte === undefined) return null;
  const [live, archived] = await Promise.all([
    orNotFound(listPlots({ ctx, input: { siteId } })),
    orNotFound(listPlots({ ctx, input: { siteId, archived: 'yes' } })),
  ]);
  const names = new Map([...archived.plots, ...live.plots].map((plot) => [plot.id, plot.name]));
  const { results } = await orNotFound(listResults({ ctx, input: { siteId, analyte: analyte.key } }));
  const tests = testsOf(results, names);
  const { pair, replaced } = pairFor(asked, tests, plotId);
  const choice: Choice | null = pair === null ? null : { analyte: analyte.key, ...pair };
  return {
    hemisphere: site.hemisphere,
    analytes,
    analyte,
    tests,
    presets: presetsFor(tests, plotId, site.hemisphere),
    choice,
    replaced: replaced || (asked.analyte !== null && asked.analyte !== analyte.key),
    answer: choice === null ? null : await orNotFound(compareResults({ ctx, input: { siteId, ...choice } })),
  };
}
