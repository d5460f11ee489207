import { plot } from '@/db/schema';
import { createPlotInput, type Plot } from '@/lib/schemas/plots';
import { targetSetColumns } from '../targets/targetSetColumns';
import { siteVerb } from '../verb';
import { nameOnce, plotNow, todayOf } from './plotNow';

export const createPlot = siteVerb({
  act: 'ground.edit',
  input: createPlotInput,
  run: async (tools): Promise<Plot> => {
    const { ctx, tx, siteId, person, input, audit } = tools;
    const { outline, areaTypedM2, targetSetKey, ...facts } = input;
    const set = await targetSetColumns(tx, siteId, targetSetKey);
    const [row] = await nameOnce(input.name, () =>
      tx
        .insert(plot)
        .values({
          siteId,
          ...facts,
          ...set,
          outline: (outline ?? []).map(({ x, y }): [number, number] => [x, y]),
          outlineSince: outline ? todayOf(ctx, person) : null,
          areaTypedM2: areaTypedM2 === null ? null : String(areaTypedM2),
          createdAt: ctx.now,
        })
        .returning({ id: plot.id }),
    );
    if (!row) throw new Error('The plot was not written.');
    await audit({ act: 'plot.create', objectKind: 'plot', objectId: row.id, detail: { name: input.name } });
    return plotNow(tools, row.id);
  },
});
