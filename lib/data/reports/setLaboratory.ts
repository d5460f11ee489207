import { and, eq, sql } from 'drizzle-orm';
import { report } from '@/db/schema';
import { setLaboratoryInput } from '@/lib/schemas/reports';
import { laboratoryOf } from '../laboratories/laboratoryOf';
import { siteVerb } from '../verb';
import { getReportInSite } from './getReportInSite';
import { type StateAnswer, staleReport, stateAnswer } from './reportAnswer';
import { stateConflict } from './stateConflict';

export const setLaboratory = siteVerb({
  act: 'reading.work',
  input: setLaboratoryInput,
  run: async ({ tx, siteId, input, audit }): Promise<StateAnswer> => {
    const { reportId, version } = input;
    const before = await getReportInSite(tx, siteId, reportId);
    const laboratoryId = await laboratoryOf(tx, siteId, input);
    const [row] = await tx
      .update(report)
      .set({ laboratoryId, version: sql`${report.version} + 1` })
      .where(
        and(
          eq(report.siteId, siteId),
          eq(report.id, reportId),
          eq(report.version, version),
          eq(report.state, 'in-review'),
        ),
      )
      .returning();
    if (!row) {
      const now = await getReportInSite(tx, siteId, reportId);
      throw now.state === 'in-review'
        ? staleReport({ ...stateAnswer(now), laboratoryId: now.laboratoryId })
        : await stateConflict(tx, now);
    }
    const detail = { from: before.laboratoryId, to: laboratoryId };
    await audit({ act: 'report.set-laboratory', objectKind: 'report', objectId: reportId, detail });
    return stateAnswer(row);
  },
});
