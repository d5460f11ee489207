import { and, eq, isNull, sql } from 'drizzle-orm';
import { plot } from '@/db/schema';
import { type Plot, plotVersionInput } from '@/lib/schemas/plots';
import { siteVerb } from '../verb';
import { plotConflict, plotNow } from './plotNow';

/** An archived plot keeps its history; it only leaves the plan and the lists. */
export const archivePlot = siteVerb({
  act: 'ground.edit',
  input: plotVersionInput,
  run: async (tools): Promise<Plot> => {
    const { ctx, tx, siteId, input, audit } = tools;
    const rows = await tx
      .update(plot)
      .set({ archivedAt: ctx.now, version: sql`${plot.version} + 1` })
      .where(
        and(
          eq(plot.siteId, siteId),
          eq(plot.id, input.plotId),
          eq(plot.version, input.version),
          isNull(plot.archivedAt),
        ),
      )
      .returning({ id: plot.id });
    if (rows.length === 0) throw await plotConflict(tools, input.plotId);
    await audit({ act: 'plot.archive', objectKind: 'plot', objectId: input.plotId });
    return plotNow(tools, input.plotId);
  },
});
