import { Problem } from '@/lib/errors';
import { setSampleInput } from '@/lib/schemas/review';
import { assertDayCame } from '../dayCame';
import { getPlotInSite } from '../plots/getPlotInSite';
import { siteVerb } from '../verb';
import { reportInReview } from './reportInReview';
import { getSampleInReport, type SampleAnswer, toSample, writeSample } from './sampleStore';

const text = (value: number | null | undefined) => (value === null || value === undefined ? value : String(value));

function assertDepths(from: string | null, to: string | null): void {
  if (from === null || to === null || Number(from) < Number(to)) return;
  const sentence = 'The depth must end deeper than it begins.';
  throw new Problem('invalid', sentence, { fields: { depthToCm: sentence } });
}

/** Which plot, which day, how deep; or left out with a reason. */
export const setSample = siteVerb({
  act: 'reading.work',
  input: setSampleInput,
  run: async ({ ctx, tx, siteId, person, input, audit }): Promise<SampleAnswer> => {
    const { reportId, reportSampleId, version, depthFromCm, depthToCm, ...plain } = input;
    await reportInReview(tx, siteId, reportId);
    const before = await getSampleInReport(tx, siteId, reportId, reportSampleId);
    if (plain.plotId && plain.plotId !== before.plotId) {
      const plot = await getPlotInSite(tx, siteId, plain.plotId);
      if (plot.archivedAt) {
        throw new Problem('conflict', `${plot.name} is archived. Bring it back first, or choose another plot.`, {
          reason: 'archived',
        });
      }
    }
    assertDayCame(ctx, person, plain.takenOn, 'takenOn');
    const depths = {
      ...(depthFromCm === undefined ? {} : { depthFromCm: text(depthFromCm) ?? null }),
      ...(depthToCm === undefined ? {} : { depthToCm: text(depthToCm) ?? null }),
    };
    const after = { ...before, ...depths };
    assertDepths(after.depthFromCm, after.depthToCm);
    const row = await writeSample(tx, siteId, { reportId, reportSampleId, version }, { ...plain, ...depths });
    await audit({
      act: 'sample.assign',
      objectKind: 'report-sample',
      objectId: reportSampleId,
      detail: { reportId, plotId: row.plotId, takenOn: row.takenOn, leftOut: row.leftOutReason },
    });
    return toSample(row);
  },
});
