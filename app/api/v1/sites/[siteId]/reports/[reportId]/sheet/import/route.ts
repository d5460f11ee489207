import { route } from '@/app/api/v1/_route';
import { importOwnSheet } from '@/lib/data/ownSheets/importOwnSheet';
import { sheetImportedSchema } from '@/lib/schemas/ownSheets';

export const POST = route({
  verb: importOwnSheet,
  answer: sheetImportedSchema,
  summary: 'Make the numbers of an own spreadsheet results, all or none',
});
