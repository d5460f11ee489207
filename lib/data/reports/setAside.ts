import { and, eq, inArray, sql } from 'drizzle-orm';
import { reportSample } from '@/db/schema';
import { Problem } from '@/lib/errors';
import { reportInput } from '@/lib/schemas/reports';
import { siteVerb } from '../verb';
import { getReportInSite } from './getReportInSite';
import { moveReport } from './moveReport';
import { type StateAnswer, stateAnswer } from './reportAnswer';

/** Out of the inbox, file and rows kept. A helper takes back only what they sent in themselves. */
export const setAside = siteVerb({
  act: 'reading.work',
  input: reportInput,
  run: async ({ tx, siteId, person, role, input, audit }): Promise<StateAnswer> => {
    const before = await getReportInSite(tx, siteId, input.reportId, 'update');
    if (role === 'helper' && before.uploadedBy !== person.id) {
      throw new Problem('forbidden', 'As helper you can take back only reports that you sent in yourself.');
    }
    const row = await moveReport(tx, siteId, input.reportId, ['in-review', 'unreadable', 'not-soil'], {
      state: 'set-aside',
    });
    const mine = tx
      .select({ id: reportSample.id })
      .from(reportSample)
      .where(and(eq(reportSample.siteId, siteId), eq(reportSample.reportId, row.id)));
    // Another report that counted on this one stands for itself again; it cannot be confirmed yet, or this one would be.
    await tx
      .update(reportSample)
      .set({ sameAsId: null, version: sql`${reportSample.version} + 1` })
      .where(and(eq(reportSample.siteId, siteId), inArray(reportSample.sameAsId, mine)));
    const detail = { from: before.state };
    await audit({ act: 'report.set-aside', objectKind: 'report', objectId: row.id, detail });
    return stateAnswer(row);
  },
});
