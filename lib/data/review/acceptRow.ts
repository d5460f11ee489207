import { type ReviewRow, rowVersionInput } from '@/lib/schemas/review';
import { siteVerb } from '../verb';
import { reportInReview } from './reportInReview';
import { getRowInReport, rowAnswer, staleRow, writeRow } from './rowStore';

/** "It is right": the doubts end, and the trail keeps which they were. */
export const acceptRow = siteVerb({
  act: 'reading.work',
  input: rowVersionInput,
  run: async ({ ctx, tx, siteId, person, input, audit }): Promise<ReviewRow> => {
    const { reportId, rowId } = input;
    await reportInReview(tx, siteId, reportId);
    const before = await getRowInReport(tx, siteId, reportId, rowId);
    const row = await writeRow(tx, siteId, input, { doubts: [], editedBy: person.id, editedAt: ctx.now });
    if (!row) throw staleRow(await rowAnswer(tx, await getRowInReport(tx, siteId, reportId, rowId)));
    const detail = {
      reportId,
      analyte: before.analyte,
      printed: before.printed,
      doubts: before.doubts.map((one) => one.code),
    };
    await audit({ act: 'row.accept', objectKind: 'reading-row', objectId: rowId, detail });
    return rowAnswer(tx, row);
  },
});
