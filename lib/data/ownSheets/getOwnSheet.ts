import type { OwnSheet } from '@/lib/schemas/ownSheets';
import { reportInput } from '@/lib/schemas/reports';
import { siteVerb } from '../verb';
import { sheetAnswer } from './sheetAnswer';
import { getSheetOfReport, mappingNow } from './sheetStore';

/** A grower's own sheet: its columns, what they are taken for, and what would come of it. */
export const getOwnSheet = siteVerb({
  act: 'reading.work',
  input: reportInput,
  run: async ({ ctx, tx, siteId, input }): Promise<OwnSheet> => {
    const row = await getSheetOfReport(tx, siteId, input.reportId);
    return sheetAnswer(tx, ctx, siteId, row, await mappingNow(tx, siteId, row));
  },
});
