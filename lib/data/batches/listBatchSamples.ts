import { and, asc, eq } from 'drizzle-orm';
import { report, reportSample, uploadBatchFile } from '@/db/schema';
import { type BatchSamples, batchInput } from '@/lib/schemas/batches';
import { loadKnownNames, proposePlot } from '../reports/suggestPlots';
import { siteVerb } from '../verb';
import { getBatchInSite } from './getBatchInSite';

/** Every sample of the batch that waits for review, with the plot it has or the one that would fit. */
export const listBatchSamples = siteVerb({
  act: 'reading.work',
  input: batchInput,
  run: async ({ tx, siteId, input }): Promise<BatchSamples> => {
    const batch = await getBatchInSite(tx, siteId, input.batchId);
    const rows = await tx
      .select({ sample: reportSample, fileName: uploadBatchFile.fileName })
      .from(uploadBatchFile)
      .innerJoin(report, and(eq(report.siteId, siteId), eq(report.id, uploadBatchFile.reportId)))
      .innerJoin(reportSample, and(eq(reportSample.siteId, siteId), eq(reportSample.reportId, report.id)))
      .where(
        and(eq(uploadBatchFile.siteId, siteId), eq(uploadBatchFile.batchId, batch.id), eq(report.state, 'in-review')),
      )
      .orderBy(asc(uploadBatchFile.ordinal), asc(reportSample.ordinal));
    const known = await loadKnownNames(tx, siteId, null);
    const plots = [...known.plots].sort((a, b) => a.name.localeCompare(b.name, 'en'));
    return {
      plots,
      samples: rows.map(({ sample, fileName }) => ({
        id: sample.id,
        reportId: sample.reportId,
        fileName,
        printedName: sample.printedName,
        fieldName: sample.fieldName,
        labNumber: sample.labNumber,
        takenOn: sample.takenOn,
        sampledPrinted: sample.sampledPrinted,
        plotId: sample.plotId,
        proposal: proposePlot(sample, known),
        leftOut: sample.leftOutReason !== null,
        version: sample.version,
      })),
    };
  },
});
