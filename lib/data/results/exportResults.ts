import { asc, eq } from 'drizzle-orm';
import { plot, site } from '@/db/schema';
import { analyte, isAnalyteKey, isMethodKey, methodLabel } from '@/lib/domain/analytes';
import { listResultsInput } from '@/lib/schemas/results';
import { getPlotInSite } from '../plots/getPlotInSite';
import { siteVerb } from '../verb';
import { toCsv } from './csv';
import { loadResults, resultFilter } from './loadResults';

const HEADER = [
  'plot',
  'taken on',
  'depth from cm',
  'depth to cm',
  'laboratory',
  'bag',
  'analysis',
  'analyte',
  'analyte key',
  'method',
  'method key',
  'form',
  'qualifier',
  'value',
  'unit',
  'value mg/kg',
  'as printed',
  'confirmed at',
];

/** Confirmed results as a data file. */
export const exportResults = siteVerb({
  act: 'site.read',
  input: listResultsInput,
  run: async ({ tx, siteId, input }): Promise<{ fileName: string; text: string }> => {
    if (input.plotId) await getPlotInSite(tx, siteId, input.plotId);
    const plots = await tx
      .select({ id: plot.id, name: plot.name })
      .from(plot)
      .where(eq(plot.siteId, siteId))
      .orderBy(asc(plot.name));
    const names = new Map(plots.map((one) => [one.id, one.name]));
    const results = await loadResults(tx, siteId, resultFilter(input));
    const rows = results.map((one) => [
      names.get(one.plotId) ?? null,
      one.takenOn,
      one.depthFromCm,
      one.depthToCm,
      one.laboratory?.name ?? null,
      one.composite,
      one.analysis,
      isAnalyteKey(one.analyte) ? analyte(one.analyte).label : one.analyte,
      one.analyte,
      one.method !== null && isMethodKey(one.method) ? methodLabel(one.method) : null,
      one.method,
      one.form,
      one.qualifier === '=' ? null : one.qualifier,
      one.value,
      one.unit,
      one.valueSi,
      one.printed,
      one.confirmedAt,
    ]);
    const [place] = await tx.select({ name: site.name }).from(site).where(eq(site.id, siteId));
    const about = input.plotId ? names.get(input.plotId) : place?.name;
    return { fileName: `${about ?? 'Results'} soil results.csv`, text: toCsv([HEADER, ...rows]) };
  },
});
