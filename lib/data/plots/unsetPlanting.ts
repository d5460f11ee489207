import { and, eq } from 'drizzle-orm';
import { planting } from '@/db/schema';
import { type Plot, unsetPlantingInput } from '@/lib/schemas/plots';
import { siteVerb } from '../verb';
import { lockPlots } from './lockPlots';
import { plotNow } from './plotNow';

export const unsetPlanting = siteVerb({
  act: 'ground.edit',
  input: unsetPlantingInput,
  run: async (tools): Promise<Plot> => {
    const { tx, siteId, input, audit } = tools;
    const { plotId, year } = input;
    await lockPlots(tx, siteId, [plotId]);
    const gone = await tx
      .delete(planting)
      .where(and(eq(planting.siteId, siteId), eq(planting.plotId, plotId), eq(planting.year, year)))
      .returning({ crop: planting.crop });
    if (gone.length > 0) {
      const detail = { year, crop: gone.map((row) => row.crop) };
      await audit({ act: 'planting.unset', objectKind: 'plot', objectId: plotId, detail });
    }
    return plotNow(tools, plotId);
  },
});
