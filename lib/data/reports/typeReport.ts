import { report, reportSample } from '@/db/schema';
import { typeReportInput } from '@/lib/schemas/reports';
import { assertDayCame } from '../dayCame';
import { laboratoryOf } from '../laboratories/laboratoryOf';
import { getLivePlotInSite } from '../plots/getLivePlotInSite';
import { assertDepths } from '../review/assertDepths';
import { siteVerb } from '../verb';
import { type StateAnswer, stateAnswer } from './reportAnswer';

/** A report without a file: its samples are there at once, its rows are typed in review. */
export const typeReport = siteVerb({
  act: 'reading.work',
  input: typeReportInput,
  run: async ({ ctx, tx, siteId, person, input, audit }): Promise<StateAnswer> => {
    for (const sample of input.samples) {
      assertDayCame(ctx, person, sample.takenOn, 'takenOn');
      assertDepths(sample.depthFromCm, sample.depthToCm);
    }
    for (const plotId of new Set(input.samples.map((sample) => sample.plotId))) {
      if (plotId) await getLivePlotInSite(tx, siteId, plotId);
    }
    const [row] = await tx
      .insert(report)
      .values({
        siteId,
        origin: 'typed',
        state: 'in-review',
        laboratoryId: await laboratoryOf(tx, siteId, input),
        laboratoryPrinted: input.laboratoryName,
        uploadedBy: person.id,
        uploadedAt: ctx.now,
      })
      .returning();
    if (!row) throw new Error('The report was not written.');
    await tx.insert(reportSample).values(
      input.samples.map((sample, at) => ({
        siteId,
        reportId: row.id,
        ordinal: at + 1,
        printedName: sample.name,
        labNumber: sample.labNumber,
        plotId: sample.plotId,
        takenOn: sample.takenOn,
        depthFromCm: sample.depthFromCm === null ? null : String(sample.depthFromCm),
        depthToCm: sample.depthToCm === null ? null : String(sample.depthToCm),
      })),
    );
    const detail = { samples: input.samples.length };
    await audit({ act: 'report.type-in', objectKind: 'report', objectId: row.id, detail });
    return stateAnswer(row);
  },
});
