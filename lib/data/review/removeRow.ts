import { rowVersionInput } from '@/lib/schemas/review';
import { siteVerb } from '../verb';
import { changeRow } from './changeRow';

/** Out of the review, not out of the record: it can be brought back until the report is confirmed. */
export const removeRow = siteVerb({
  act: 'reading.work',
  input: rowVersionInput,
  run: (tools) => changeRow(tools, { act: 'row.remove', columns: () => ({ state: 'removed' }) }),
});
