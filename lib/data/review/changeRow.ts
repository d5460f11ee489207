import type { z } from 'zod';
import type { ReviewRow, rowVersionInput } from '@/lib/schemas/review';
import type { SiteTools } from '../verb';
import { reportInReview } from './reportInReview';
import type { RowColumns } from './reviewRow';
import { getRowInReport, rowAnswer, staleRow, writeRow } from './rowStore';

type Tools = SiteTools<z.output<typeof rowVersionInput>>;
type Change = {
  act: 'row.accept' | 'row.remove' | 'row.restore';
  columns: (before: RowColumns) => Partial<Pick<RowColumns, 'state' | 'doubts'>>;
  /** What the trail keeps beside analyte and value. */
  detail?: (before: RowColumns) => Record<string, unknown>;
};

/** One decision about a whole row of a review, against the version that was on screen. */
export async function changeRow(tools: Tools, { act, columns, detail }: Change): Promise<ReviewRow> {
  const { ctx, tx, siteId, person, input, audit } = tools;
  const { reportId, rowId } = input;
  await reportInReview(tx, siteId, reportId);
  const before = await getRowInReport(tx, siteId, reportId, rowId);
  const row = await writeRow(tx, siteId, input, { ...columns(before), editedBy: person.id, editedAt: ctx.now });
  if (!row) throw staleRow(await rowAnswer(tx, await getRowInReport(tx, siteId, reportId, rowId)));
  await audit({
    act,
    objectKind: 'reading-row',
    objectId: rowId,
    detail: { reportId, analyte: before.analyte, printed: before.printed, ...detail?.(before) },
  });
  return rowAnswer(tx, row);
}
