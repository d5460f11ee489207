import { rowVersionInput } from '@/lib/schemas/review';
import { siteVerb } from '../verb';
import { changeRow } from './changeRow';
import type { RowColumns } from './reviewRow';

const stateBefore = (row: RowColumns) => {
  if (row.state !== 'removed') return row.state;
  if (row.original !== null) return 'edited';
  return row.confidence === null ? 'added' : 'proposed';
};

export const restoreRow = siteVerb({
  act: 'reading.work',
  input: rowVersionInput,
  run: (tools) => changeRow(tools, { act: 'row.restore', columns: (before) => ({ state: stateBefore(before) }) }),
});
