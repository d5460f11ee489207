import { route } from '@/app/api/v1/_route';
import { getOwnSheet } from '@/lib/data/ownSheets/getOwnSheet';
import { mapOwnSheet } from '@/lib/data/ownSheets/mapOwnSheet';
import { ownSheetSchema } from '@/lib/schemas/ownSheets';

export const GET = route({
  verb: getOwnSheet,
  answer: ownSheetSchema,
  summary: 'A grower’s own spreadsheet: what its columns are taken for and what would come of it',
});

export const PUT = route({
  verb: mapOwnSheet,
  answer: ownSheetSchema,
  summary: 'Say what the columns of an own spreadsheet hold',
});
