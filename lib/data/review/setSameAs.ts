import { and, eq, ne } from 'drizzle-orm';
import { report, reportSample } from '@/db/schema';
import { notFound, Problem } from '@/lib/errors';
import { setSameAsInput } from '@/lib/schemas/review';
import { siteVerb } from '../verb';
import { reportInReview } from './reportInReview';
import { getSampleInReport, type SampleAnswer, toSample, writeSample } from './sampleStore';

const chained = (sentence: string) => new Problem('conflict', sentence, { reason: 'same-as-chain' });

/** Says that a sample is another report's analysis in another form, or takes that back. One step only: no chains. */
export const setSameAs = siteVerb({
  act: 'reading.work',
  input: setSameAsInput,
  run: async ({ tx, siteId, input, audit }): Promise<SampleAnswer> => {
    const { reportId, reportSampleId, version, sameAsId } = input;
    await reportInReview(tx, siteId, reportId);
    await getSampleInReport(tx, siteId, reportId, reportSampleId);
    if (sameAsId !== null) {
      const [other] = await tx
        .select({ sameAsId: reportSample.sameAsId, leftOut: reportSample.leftOutReason, state: report.state })
        .from(reportSample)
        .innerJoin(report, and(eq(report.siteId, siteId), eq(report.id, reportSample.reportId)))
        .where(and(eq(reportSample.siteId, siteId), eq(reportSample.id, sameAsId), ne(reportSample.reportId, reportId)))
        .for('share');
      if (!other) throw notFound();
      if (other.sameAsId !== null)
        throw chained('That sample is itself marked as another one. Choose the one it points to.');
      if (other.leftOut !== null || (other.state !== 'in-review' && other.state !== 'confirmed')) {
        throw chained('That sample gives no results, so this one cannot lean on it.');
      }
    }
    const row = await writeSample(tx, siteId, { reportId, reportSampleId, version }, { sameAsId });
    if (sameAsId !== null) {
      // After the write: whoever was about to lean on this sample held it until now, and is seen here.
      const leaning = await tx
        .select({ id: reportSample.id })
        .from(reportSample)
        .where(and(eq(reportSample.siteId, siteId), eq(reportSample.sameAsId, reportSampleId)))
        .limit(1);
      if (leaning.length > 0) throw chained('Another sample is marked as the same as this one. Take that back first.');
    }
    const detail = { reportId, sameAsId };
    await audit({ act: 'sample.same-as', objectKind: 'report-sample', objectId: reportSampleId, detail });
    return toSample(row);
  },
});
