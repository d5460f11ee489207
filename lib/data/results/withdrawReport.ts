import { and, eq, inArray, isNull, ne } from 'drizzle-orm';
import { report, reportSample, result } from '@/db/schema';
import { Problem } from '@/lib/errors';
import { reportReasonInput } from '@/lib/schemas/reports';
import { unlearnReport } from '../learning/learnFromReport';
import { lockPlots } from '../plots/lockPlots';
import { refreshReminders } from '../reminders/refreshReminders';
import { moveReport } from '../reports/moveReport';
import { type StateAnswer, stateAnswer } from '../reports/reportAnswer';
import { enqueue } from '../transaction';
import { siteVerb } from '../verb';

/** confirmed -> in-review: the results are superseded with the reason, the review stays as it was. */
export const withdrawReport = siteVerb({
  act: 'reading.decide',
  input: reportReasonInput,
  run: async ({ ctx, tx, siteId, input, audit }): Promise<StateAnswer> => {
    const { reportId, reason } = input;
    const row = await moveReport(tx, siteId, reportId, ['confirmed'], {
      state: 'in-review',
      confirmedBy: null,
      confirmedAt: null,
      withdrawnReason: reason,
    });
    const mine = await tx
      .select({ id: reportSample.id, plotId: reportSample.plotId, sampleId: reportSample.sampleId })
      .from(reportSample)
      .where(and(eq(reportSample.siteId, siteId), eq(reportSample.reportId, reportId)));
    const plotIds = [...new Set(mine.flatMap((one) => (one.plotId === null ? [] : [one.plotId])))];
    await lockPlots(tx, siteId, plotIds);
    const ids = mine.map((one) => one.id);
    const [leaning] =
      ids.length === 0
        ? []
        : await tx
            .select({ fileName: report.fileName })
            .from(reportSample)
            .innerJoin(report, and(eq(report.siteId, siteId), eq(report.id, reportSample.reportId)))
            .where(
              and(
                eq(reportSample.siteId, siteId),
                ne(reportSample.reportId, reportId),
                inArray(reportSample.sameAsId, ids),
                eq(report.state, 'confirmed'),
              ),
            )
            .limit(1);
    if (leaning) {
      throw new Problem(
        'conflict',
        `${leaning.fileName ?? 'Another report'} was confirmed as the same analysis and counts through this one. Withdraw that one first.`,
        { reason: 'same-as-leans' },
      );
    }
    // Through the bags, which the index of live results begins with; a table of many years is not searched.
    const bags = [...new Set(mine.flatMap((one) => (one.sampleId === null ? [] : [one.sampleId])))];
    const gone =
      bags.length === 0
        ? []
        : await tx
            .update(result)
            .set({ supersededAt: ctx.now, supersededReason: reason })
            .where(
              and(
                eq(result.siteId, siteId),
                inArray(result.sampleId, bags),
                eq(result.reportId, reportId),
                isNull(result.supersededAt),
              ),
            )
            .returning({ id: result.id });
    await unlearnReport(tx, siteId, reportId);
    const detail = { reason, results: gone.length };
    await audit({ act: 'report.withdraw', objectKind: 'report', objectId: reportId, detail });
    await enqueue(tx, 'recheck-reviews', { siteId, id: reportId });
    for (const plotId of plotIds) await refreshReminders(tx, ctx, siteId, plotId);
    // One is enough: the recheck looks at the whole site, since a plot can serve another as its control.
    const [anyPlot] = plotIds;
    if (anyPlot) await enqueue(tx, 'recheck-effects', { siteId, id: anyPlot });
    return stateAnswer(row);
  },
});
