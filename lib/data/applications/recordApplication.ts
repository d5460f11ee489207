import { application, plan, planIntent, planLine } from '@/db/schema';
import { recordApplicationInput } from '@/lib/schemas/applications';
import { getLivePlotInSite } from '../plots/getLivePlotInSite';
import { refreshReminders } from '../reminders/refreshReminders';
import { enqueue } from '../transaction';
import { siteVerb } from '../verb';
import { freezeMaterial } from './material';
import { columnsOf, toKg } from './writeApplication';

/** What was really spread. Without a plan it makes an adopted one-line plan of its own, so that its intention can be checked. */
export const recordApplication = siteVerb({
  act: 'record.add',
  input: recordApplicationInput,
  run: async ({ ctx, tx, siteId, person, input, audit }) => {
    const plotRow = await getLivePlotInSite(tx, siteId, input.plotId);
    const material = freezeMaterial(input.material);
    const columns = columnsOf(plotRow, input, ctx, person.timeZone);
    const [planRow] = await tx
      .insert(plan)
      .values({
        siteId,
        plotId: plotRow.id,
        year: Number(input.appliedOn.slice(0, 4)),
        state: 'spread',
        fromApplication: true,
        createdBy: person.id,
        adoptedAt: ctx.now,
      })
      .returning({ id: plan.id });
    if (!planRow) throw new Error('The plan was not written.');
    const [line] = await tx
      .insert(planLine)
      .values({
        siteId,
        planId: planRow.id,
        material,
        amountKg: String(toKg(input.plannedAmount ?? input.amount, input.amountUnit)),
        areaM2: columns.areaM2,
      })
      .returning({ id: planLine.id });
    if (!line) throw new Error('The plan line was not written.');
    if (input.intents.length > 0) {
      await tx.insert(planIntent).values(
        input.intents.map((intent) => ({
          siteId,
          planId: planRow.id,
          analyte: intent.analyte,
          unit: intent.unit,
          fullChange: String(intent.fullChange),
          low: intent.low === null ? null : String(intent.low),
          high: intent.high === null ? null : String(intent.high),
          source: intent.source,
        })),
      );
    }
    const [row] = await tx
      .insert(application)
      .values({
        siteId,
        plotId: plotRow.id,
        planId: planRow.id,
        planLineId: line.id,
        material,
        ...columns,
        recordedBy: person.id,
        recordedAt: ctx.now,
      })
      .returning({ id: application.id });
    if (!row) throw new Error('The application was not written.');
    await audit({
      act: 'application.record',
      objectKind: 'application',
      objectId: row.id,
      detail: { plotId: plotRow.id, material: material.key, amount: columns.amountPrinted },
    });
    await refreshReminders(tx, ctx, siteId, plotRow.id);
    await enqueue(tx, 'recheck-effects', { siteId, id: plotRow.id });
    return { id: row.id };
  },
});
