import { type ReviewRow, rowVersionInput } from '@/lib/schemas/review';
import { siteVerb } from '../verb';
import { reportInReview } from './reportInReview';
import type { RowColumns } from './reviewRow';
import { getRowInReport, rowAnswer, staleRow, writeRow } from './rowStore';

const stateBefore = (row: RowColumns) => {
  if (row.state !== 'removed') return row.state;
  if (row.original !== null) return 'edited';
  return row.confidence === null ? 'added' : 'proposed';
};

export const restoreRow = siteVerb({
  act: 'reading.work',
  input: rowVersionInput,
  run: async ({ ctx, tx, siteId, person, input, audit }): Promise<ReviewRow> => {
    const { reportId, rowId } = input;
    await reportInReview(tx, siteId, reportId);
    const before = await getRowInReport(tx, siteId, reportId, rowId);
    const row = await writeRow(tx, siteId, input, {
      state: stateBefore(before),
      editedBy: person.id,
      editedAt: ctx.now,
    });
    if (!row) throw staleRow(await rowAnswer(tx, await getRowInReport(tx, siteId, reportId, rowId)));
    const detail = { reportId, analyte: before.analyte, printed: before.printed };
    await audit({ act: 'row.restore', objectKind: 'reading-row', objectId: rowId, detail });
    return rowAnswer(tx, row);
  },
});
