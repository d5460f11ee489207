import { copyInput, type PageCopy } from '@/lib/schemas/copies';
import { siteVerb } from '../verb';
import { getCopyInReport, toCopy } from './copyStore';

export const getCopy = siteVerb({
  act: 'reading.work',
  input: copyInput,
  run: async ({ tx, siteId, input }): Promise<PageCopy> =>
    toCopy(await getCopyInReport(tx, siteId, input.reportId, input.copyId)),
});
