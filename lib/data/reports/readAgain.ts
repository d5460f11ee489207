import { reportInput } from '@/lib/schemas/reports';
import { enqueue } from '../transaction';
import { siteVerb } from '../verb';
import { moveReport } from './moveReport';
import { type StateAnswer, stateAnswer } from './reportAnswer';

/** Another try for a file that gave nothing: the store was down, or the reader has learnt since. */
export const readAgain = siteVerb({
  act: 'reading.decide',
  input: reportInput,
  run: async ({ tx, siteId, input, audit }): Promise<StateAnswer> => {
    const row = await moveReport(tx, siteId, input.reportId, ['unreadable', 'not-soil'], {
      state: 'received',
      readingStartedAt: null,
      refusalCode: null,
      refusalSentence: null,
      pagesRead: 0,
    });
    await audit({ act: 'report.read-again', objectKind: 'report', objectId: row.id });
    await enqueue(tx, 'read-report', { siteId, id: row.id });
    return stateAnswer(row);
  },
});
