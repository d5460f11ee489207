import { and, eq } from 'drizzle-orm';
import { reportSample } from '@/db/schema';
import { reportInput } from '@/lib/schemas/reports';
import { siteVerb } from '../verb';
import { getReportInSite } from './getReportInSite';
import { moveReport } from './moveReport';
import { type StateAnswer, stateAnswer } from './reportAnswer';

/** Back to where it was: to review, or, when nothing was ever read from it, to what the reader said. */
export const bringBack = siteVerb({
  act: 'reading.decide',
  input: reportInput,
  run: async ({ tx, siteId, input, audit }): Promise<StateAnswer> => {
    const before = await getReportInSite(tx, siteId, input.reportId, 'update');
    const samples = await tx
      .select({ id: reportSample.id })
      .from(reportSample)
      .where(and(eq(reportSample.siteId, siteId), eq(reportSample.reportId, before.id)))
      .limit(1);
    const refused = before.refusalCode === 'not-soil' ? 'not-soil' : 'unreadable';
    const state = samples.length > 0 || before.refusalCode === null ? 'in-review' : refused;
    const row = await moveReport(tx, siteId, before.id, ['set-aside'], { state });
    await audit({ act: 'report.bring-back', objectKind: 'report', objectId: row.id });
    return stateAnswer(row);
  },
});
