import { and, eq, isNotNull, sql } from 'drizzle-orm';
import { plot } from '@/db/schema';
import { Problem } from '@/lib/errors';
import { type Plot, plotVersionInput } from '@/lib/schemas/plots';
import { siteVerb } from '../verb';
import { nameOnce, plotNow } from './plotNow';

export const restorePlot = siteVerb({
  act: 'ground.edit',
  input: plotVersionInput,
  run: async (tools): Promise<Plot> => {
    const { tx, siteId, input, audit } = tools;
    const before = await plotNow(tools, input.plotId);
    const rows = await nameOnce(before.name, () =>
      tx
        .update(plot)
        .set({ archivedAt: null, version: sql`${plot.version} + 1` })
        .where(
          and(
            eq(plot.siteId, siteId),
            eq(plot.id, input.plotId),
            eq(plot.version, input.version),
            isNotNull(plot.archivedAt),
          ),
        )
        .returning({ id: plot.id }),
    );
    if (rows.length === 0) {
      throw new Problem('conflict', 'This plot is not archived any more, or somebody changed it just now.', {
        reason: 'stale-version',
        current: await plotNow(tools, input.plotId),
      });
    }
    await audit({ act: 'plot.restore', objectKind: 'plot', objectId: input.plotId });
    return plotNow(tools, input.plotId);
  },
});
