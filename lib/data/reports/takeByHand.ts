import { and, eq } from 'drizzle-orm';
import { reportSample } from '@/db/schema';
import { reportInput } from '@/lib/schemas/reports';
import { siteVerb } from '../verb';
import { moveReport } from './moveReport';
import { type StateAnswer, stateAnswer } from './reportAnswer';

/** What the reader could not read, a person types in beside the page. */
export const takeByHand = siteVerb({
  act: 'reading.work',
  input: reportInput,
  run: async ({ tx, siteId, input, audit }): Promise<StateAnswer> => {
    const row = await moveReport(tx, siteId, input.reportId, ['unreadable', 'not-soil'], { state: 'in-review' });
    const there = await tx
      .select({ id: reportSample.id })
      .from(reportSample)
      .where(and(eq(reportSample.siteId, siteId), eq(reportSample.reportId, row.id)))
      .limit(1);
    if (there.length === 0) {
      await tx.insert(reportSample).values({ siteId, reportId: row.id, ordinal: 1, plotId: row.droppedOnPlotId });
    }
    const detail = { refusal: row.refusalCode };
    await audit({ act: 'report.take-by-hand', objectKind: 'report', objectId: row.id, detail });
    return stateAnswer(row);
  },
});
