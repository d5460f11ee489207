import { and, eq, isNull, sql } from 'drizzle-orm';
import { plot } from '@/db/schema';
import { type Plot, updatePlotInput } from '@/lib/schemas/plots';
import { targetSetColumns } from '../targets/targetSetColumns';
import { siteVerb } from '../verb';
import { nameOnce, plotConflict, plotNow, todayOf } from './plotNow';

export const updatePlot = siteVerb({
  act: 'ground.edit',
  input: updatePlotInput,
  run: async (tools): Promise<Plot> => {
    const { ctx, tx, siteId, person, input, audit } = tools;
    const { plotId, version, outline, areaTypedM2, targetSetKey, ...facts } = input;
    const changes = {
      ...facts,
      ...(targetSetKey === undefined ? {} : await targetSetColumns(tx, siteId, targetSetKey)),
      ...(areaTypedM2 === undefined ? {} : { areaTypedM2: areaTypedM2 === null ? null : String(areaTypedM2) }),
      ...(outline === undefined
        ? {}
        : {
            outline: (outline ?? []).map(({ x, y }): [number, number] => [x, y]),
            outlineSince: outline ? todayOf(ctx, person) : null,
          }),
    };
    const rows = await nameOnce(input.name ?? '', () =>
      tx
        .update(plot)
        .set({ ...changes, version: sql`${plot.version} + 1` })
        .where(and(eq(plot.siteId, siteId), eq(plot.id, plotId), eq(plot.version, version), isNull(plot.archivedAt)))
        .returning({ id: plot.id }),
    );
    if (rows.length === 0) throw await plotConflict(tools, plotId);
    await audit({
      act: 'plot.update',
      objectKind: 'plot',
      objectId: plotId,
      detail: { changed: Object.keys(changes) },
    });
    return plotNow(tools, plotId);
  },
});
