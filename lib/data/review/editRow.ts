import { Problem } from '@/lib/errors';
import { editRowInput, type ReviewRow } from '@/lib/schemas/review';
import { siteVerb } from '../verb';
import { applyEdit, editColumns } from './applyEdit';
import { reportInReview } from './reportInReview';
import { getRowInReport, rowAnswer, staleRow, writeRow } from './rowStore';

/** One cell or several of one row, against the version that was on screen. */
export const editRow = siteVerb({
  act: 'reading.work',
  input: editRowInput,
  run: async ({ ctx, tx, siteId, person, input, audit }): Promise<ReviewRow> => {
    const { reportId, rowId, version, ...edits } = input;
    await reportInReview(tx, siteId, reportId);
    const before = await getRowInReport(tx, siteId, reportId, rowId);
    if (before.version !== version) throw staleRow(await rowAnswer(tx, before));
    if (before.state === 'removed') {
      throw new Problem('conflict', 'This row was removed. Bring it back first.', { reason: 'row-removed' });
    }
    const edited = applyEdit(before, edits, before.original);
    if (!edited.ok) throw new Problem('invalid', edited.sentence, { fields: { [edited.field]: edited.sentence } });
    const columns = editColumns(before, edited, person.id, ctx.now);
    const row = await writeRow(tx, siteId, { reportId, rowId, version }, columns);
    if (!row) throw staleRow(await rowAnswer(tx, await getRowInReport(tx, siteId, reportId, rowId)));
    await audit({
      act: 'row.edit',
      objectKind: 'reading-row',
      objectId: rowId,
      detail: { reportId, from: before.printed, to: row.printed, analyte: row.analyte },
    });
    return rowAnswer(tx, row);
  },
});
