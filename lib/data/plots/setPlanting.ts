import { and, eq } from 'drizzle-orm';
import { planting } from '@/db/schema';
import { type Plot, setPlantingInput } from '@/lib/schemas/plots';
import { targetSetColumns } from '../targets/targetSetColumns';
import { siteVerb } from '../verb';
import { lockPlots } from './lockPlots';
import { plotNow } from './plotNow';

/** One crop a year and plot; setting it again replaces it. */
export const setPlanting = siteVerb({
  act: 'ground.edit',
  input: setPlantingInput,
  run: async (tools): Promise<Plot> => {
    const { ctx, tx, siteId, input, audit } = tools;
    const { plotId, year, targetSetKey, ...facts } = input;
    await lockPlots(tx, siteId, [plotId]);
    const values = { ...facts, ...(await targetSetColumns(tx, siteId, targetSetKey)) };
    const here = and(eq(planting.siteId, siteId), eq(planting.plotId, plotId), eq(planting.year, year));
    await tx.delete(planting).where(here);
    await tx.insert(planting).values({ siteId, plotId, year, ...values, createdAt: ctx.now });
    await audit({ act: 'planting.set', objectKind: 'plot', objectId: plotId, detail: { year, crop: input.crop } });
    return plotNow(tools, plotId);
  },
});
