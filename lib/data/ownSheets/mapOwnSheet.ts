import { and, eq } from 'drizzle-orm';
import { ownSheet } from '@/db/schema';
import { mapSheetInput, type OwnSheet } from '@/lib/schemas/ownSheets';
import { reportInReview } from '../review/reportInReview';
import { siteVerb } from '../verb';
import { sheetAnswer } from './sheetAnswer';
import { chosen, getSheetOfReport, mappingNow } from './sheetStore';

/** What the columns hold, as the grower says; kept at once, so that nothing of it is lost. Answers what would come of it. */
export const mapOwnSheet = siteVerb({
  act: 'reading.work',
  input: mapSheetInput,
  run: async ({ ctx, tx, siteId, person, input, audit }): Promise<OwnSheet> => {
    const before = await getSheetOfReport(tx, siteId, input.reportId);
    await reportInReview(tx, siteId, input.reportId);
    const now = await mappingNow(tx, siteId, before);
    const mapping = chosen(before, now.mapping, input);
    const [row] = await tx
      .update(ownSheet)
      .set({ mapping, mappedBy: person.id, mappedAt: ctx.now })
      .where(and(eq(ownSheet.siteId, siteId), eq(ownSheet.id, before.id)))
      .returning();
    if (!row) throw new Error('The mapping was not written.');
    await audit({ act: 'sheet.map', objectKind: 'report', objectId: input.reportId, detail: { sheet: mapping.sheet } });
    return sheetAnswer(tx, ctx, siteId, row, { mapping, doubts: [], rememberedAt: null });
  },
});
