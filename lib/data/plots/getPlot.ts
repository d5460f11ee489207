import { and, asc, desc, eq } from 'drizzle-orm';
import { planting } from '@/db/schema';
import { type PlotDetail, plotInput } from '@/lib/schemas/plots';
import { siteVerb } from '../verb';
import { toPlanting } from './loadPlots';
import { plotNow } from './plotNow';

export const getPlot = siteVerb({
  act: 'site.read',
  input: plotInput,
  run: async (tools): Promise<PlotDetail> => {
    const { tx, siteId, input } = tools;
    const found = await plotNow(tools, input.plotId);
    const plantings = await tx
      .select()
      .from(planting)
      .where(and(eq(planting.siteId, siteId), eq(planting.plotId, input.plotId)))
      .orderBy(desc(planting.year), asc(planting.createdAt));
    return { ...found, plantings: plantings.map(toPlanting) };
  },
});
