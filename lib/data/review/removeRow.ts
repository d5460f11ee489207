import { type ReviewRow, rowVersionInput } from '@/lib/schemas/review';
import { siteVerb } from '../verb';
import { reportInReview } from './reportInReview';
import { getRowInReport, rowAnswer, staleRow, writeRow } from './rowStore';

/** Out of the review, not out of the record: it can be brought back until the report is confirmed. */
export const removeRow = siteVerb({
  act: 'reading.work',
  input: rowVersionInput,
  run: async ({ ctx, tx, siteId, person, input, audit }): Promise<ReviewRow> => {
    const { reportId, rowId } = input;
    await reportInReview(tx, siteId, reportId);
    const before = await getRowInReport(tx, siteId, reportId, rowId);
    const row = await writeRow(tx, siteId, input, { state: 'removed', editedBy: person.id, editedAt: ctx.now });
    if (!row) throw staleRow(await rowAnswer(tx, await getRowInReport(tx, siteId, reportId, rowId)));
    const detail = { reportId, analyte: before.analyte, printed: before.printed };
    await audit({ act: 'row.remove', objectKind: 'reading-row', objectId: rowId, detail });
    return rowAnswer(tx, row);
  },
});
