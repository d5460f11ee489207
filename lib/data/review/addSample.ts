import { and, eq, sql } from 'drizzle-orm';
import { reportSample } from '@/db/schema';
import { addSampleInput } from '@/lib/schemas/review';
import { assertDayCame } from '../dayCame';
import { getLivePlotInSite } from '../plots/getLivePlotInSite';
import { siteVerb } from '../verb';
import { reportInReview } from './reportInReview';
import { type SampleAnswer, toSample } from './sampleStore';

/** A sample the reader missed. The report is held alone, so that two of them do not get one number. */
export const addSample = siteVerb({
  act: 'reading.work',
  input: addSampleInput,
  run: async ({ ctx, tx, siteId, person, input, audit }): Promise<SampleAnswer> => {
    const { reportId, name, labNumber, plotId, takenOn } = input;
    await reportInReview(tx, siteId, reportId, 'update');
    if (plotId) await getLivePlotInSite(tx, siteId, plotId);
    assertDayCame(ctx, person, takenOn, 'takenOn');
    const [last] = await tx
      .select({ ordinal: sql<number>`coalesce(max(${reportSample.ordinal}), 0)::int` })
      .from(reportSample)
      .where(and(eq(reportSample.siteId, siteId), eq(reportSample.reportId, reportId)));
    const ordinal = (last?.ordinal ?? 0) + 1;
    const [row] = await tx
      .insert(reportSample)
      .values({ siteId, reportId, ordinal, printedName: name, labNumber, plotId, takenOn })
      .returning();
    if (!row) throw new Error('The sample was not written.');
    await audit({ act: 'sample.add', objectKind: 'report-sample', objectId: row.id, detail: { reportId } });
    return toSample(row);
  },
});
