import { setSampleInput } from '@/lib/schemas/review';
import { assertDayCame } from '../dayCame';
import { getLivePlotInSite } from '../plots/getLivePlotInSite';
import { siteVerb } from '../verb';
import { assertDepths } from './assertDepths';
import { refreshHistoryDoubts } from './refreshHistoryDoubts';
import { reportInReview } from './reportInReview';
import { getSampleInReport, type SampleAnswer, toSample, writeSample } from './sampleStore';

const text = (value: number | null | undefined) => (value === null || value === undefined ? value : String(value));

/** Which plot, which day, how deep; or left out with a reason. */
export const setSample = siteVerb({
  act: 'reading.work',
  input: setSampleInput,
  run: async ({ ctx, tx, siteId, person, input, audit }): Promise<SampleAnswer> => {
    const { reportId, reportSampleId, version, depthFromCm, depthToCm, ...plain } = input;
    await reportInReview(tx, siteId, reportId);
    const before = await getSampleInReport(tx, siteId, reportId, reportSampleId);
    if (plain.plotId && plain.plotId !== before.plotId) await getLivePlotInSite(tx, siteId, plain.plotId);
    assertDayCame(ctx, person, plain.takenOn, 'takenOn');
    const depths = {
      ...(depthFromCm === undefined ? {} : { depthFromCm: text(depthFromCm) ?? null }),
      ...(depthToCm === undefined ? {} : { depthToCm: text(depthToCm) ?? null }),
    };
    const after = { ...before, ...depths };
    assertDepths(after.depthFromCm, after.depthToCm);
    const row = await writeSample(tx, siteId, { reportId, reportSampleId, version }, { ...plain, ...depths });
    if (row.plotId !== before.plotId || row.takenOn !== before.takenOn)
      await refreshHistoryDoubts(tx, siteId, [row.id]);
    await audit({
      act: 'sample.assign',
      objectKind: 'report-sample',
      objectId: reportSampleId,
      detail: { reportId, plotId: row.plotId, takenOn: row.takenOn, leftOut: row.leftOutReason },
    });
    return toSample(row);
  },
});
