import { application } from '@/db/schema';
import { correctApplicationInput } from '@/lib/schemas/applications';
import { getPlotInSite } from '../plots/getPlotInSite';
import { refreshReminders } from '../reminders/refreshReminders';
import { enqueue } from '../transaction';
import { siteVerb } from '../verb';
import { freezeMaterial } from './material';
import { columnsOf, getLiveApplication, mayCorrect, supersede } from './writeApplication';

/** The record as it was stays; the corrected one stands in its place, with who, when and why. */
export const correctApplication = siteVerb({
  act: 'record.correct-own',
  input: correctApplicationInput,
  run: async ({ ctx, tx, siteId, role, person, input, audit }) => {
    const row = await getLiveApplication(tx, siteId, input.applicationId);
    mayCorrect(role, row, person.id);
    const plotRow = await getPlotInSite(tx, siteId, row.plotId);
    await supersede(tx, ctx, siteId, row.id, input.reason);
    const [fresh] = await tx
      .insert(application)
      .values({
        siteId,
        plotId: row.plotId,
        planId: row.planId,
        planLineId: row.planLineId,
        material: freezeMaterial(input.material),
        ...columnsOf(plotRow, input, ctx, person.timeZone),
        recordedBy: person.id,
        recordedAt: ctx.now,
        supersedesId: row.id,
      })
      .returning({ id: application.id });
    if (!fresh) throw new Error('The corrected application was not written.');
    await audit({
      act: 'application.correct',
      objectKind: 'application',
      objectId: fresh.id,
      detail: { was: row.id, reason: input.reason },
    });
    await refreshReminders(tx, ctx, siteId, row.plotId);
    await enqueue(tx, 'recheck-effects', { siteId, id: row.plotId });
    return { id: fresh.id };
  },
});
