import { rowVersionInput } from '@/lib/schemas/review';
import { siteVerb } from '../verb';
import { changeRow } from './changeRow';

/** "It is right": the doubts end, and the trail keeps which they were. */
export const acceptRow = siteVerb({
  act: 'reading.work',
  input: rowVersionInput,
  run: (tools) =>
    changeRow(tools, {
      act: 'row.accept',
      columns: () => ({ doubts: [] }),
      detail: (before) => ({ doubts: before.doubts.map((one) => one.code) }),
    }),
});
