import { and, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { application, plan, planLine } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import { correctApplicationInput } from '@/lib/schemas/applications';
import { getPlotInSite } from '../plots/getPlotInSite';
import { refreshReminders } from '../reminders/refreshReminders';
import { enqueue } from '../transaction';
import { siteVerb } from '../verb';
import { freezeMaterial } from './material';
import { columnsOf, getLiveApplication, mayCorrect, supersede, toKg } from './writeApplication';

/**
 * A record without a plan made one of its own. A slip mended in the amount is then no departure from it: the planned
 * amount follows, unless another was named. A plan that was drawn up before the spreading stays as it was adopted.
 */
async function followPlan(
  tx: Transaction,
  siteId: SiteId,
  was: typeof application.$inferSelect,
  now: { amountKg: number; plannedKg: number | null },
): Promise<void> {
  const [line] = await tx
    .select({ amountKg: planLine.amountKg, fromApplication: plan.fromApplication })
    .from(planLine)
    .innerJoin(plan, and(eq(plan.siteId, siteId), eq(plan.id, planLine.planId)))
    .where(and(eq(planLine.siteId, siteId), eq(planLine.id, was.planLineId)));
  if (!line?.fromApplication) return;
  const followed = Number(line.amountKg) === Number(was.amountKg) ? now.amountKg : Number(line.amountKg);
  await tx
    .update(planLine)
    .set({ amountKg: String(now.plannedKg ?? followed) })
    .where(and(eq(planLine.siteId, siteId), eq(planLine.id, was.planLineId)));
}

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
    await followPlan(tx, siteId, row, {
      amountKg: toKg(input.amount, input.amountUnit),
      plannedKg: input.plannedAmount === undefined ? null : toKg(input.plannedAmount, input.amountUnit),
    });
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
