import { removeApplicationInput } from '@/lib/schemas/applications';
import { refreshReminders } from '../reminders/refreshReminders';
import { enqueue } from '../transaction';
import { siteVerb } from '../verb';
import { getLiveApplication, mayCorrect, supersede } from './writeApplication';

export const removeApplication = siteVerb({
  act: 'record.correct-own',
  input: removeApplicationInput,
  run: async ({ ctx, tx, siteId, role, person, input, audit }) => {
    const row = await getLiveApplication(tx, siteId, input.applicationId);
    mayCorrect(role, row, person.id);
    await supersede(tx, ctx, siteId, row.id, input.reason);
    await audit({
      act: 'application.remove',
      objectKind: 'application',
      objectId: row.id,
      detail: { reason: input.reason },
    });
    await refreshReminders(tx, ctx, siteId, row.plotId);
    await enqueue(tx, 'recheck-effects', { siteId, id: row.plotId });
    return { id: row.id };
  },
});
