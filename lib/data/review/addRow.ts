import { and, eq, sql } from 'drizzle-orm';
import { readingRow } from '@/db/schema';
import { Problem } from '@/lib/errors';
import { addRowInput, type ReviewRow } from '@/lib/schemas/review';
import { siteVerb } from '../verb';
import { applyEdit } from './applyEdit';
import { reportInReview } from './reportInReview';
import { rowAnswer } from './rowStore';
import { getSampleInReport } from './sampleStore';

const EMPTY = {
  analyte: null,
  printed: '',
  value: null,
  qualifier: '=',
  unit: null,
  method: null,
  form: null,
} as const;

/** A row the reader missed, or one of a report that is typed in. */
export const addRow = siteVerb({
  act: 'reading.work',
  input: addRowInput,
  run: async ({ ctx, tx, siteId, person, input, audit }): Promise<ReviewRow> => {
    const { reportId, reportSampleId, analyte, ...cells } = input;
    await reportInReview(tx, siteId, reportId);
    await getSampleInReport(tx, siteId, reportId, reportSampleId);
    const added = applyEdit(EMPTY, { ...cells, ...(analyte ? { analyte } : {}) });
    if (!added.ok) throw new Problem('invalid', added.sentence, { fields: { [added.field]: added.sentence } });
    const [last] = await tx
      .select({ ordinal: sql<number>`coalesce(max(${readingRow.ordinal}), 0)::int` })
      .from(readingRow)
      .where(and(eq(readingRow.siteId, siteId), eq(readingRow.reportId, reportId)));
    const [row] = await tx
      .insert(readingRow)
      .values({
        siteId,
        reportId,
        reportSampleId,
        ordinal: (last?.ordinal ?? 0) + 1,
        ...added.facts,
        doubts: added.doubts,
        state: 'added',
        editedBy: person.id,
        editedAt: ctx.now,
      })
      .returning();
    if (!row) throw new Error('The row was not written.');
    await audit({
      act: 'row.add',
      objectKind: 'reading-row',
      objectId: row.id,
      detail: { reportId, analyte: row.analyte, printed: row.printed },
    });
    return rowAnswer(tx, row);
  },
});
