import { reminderRule } from '@/db/schema';
import { setRuleInput } from '@/lib/schemas/reminders';

import { getPlotInSite } from '../plots/getPlotInSite';
import { siteVerb } from '../verb';
import { refreshReminders } from './refreshReminders';

export const setRule = siteVerb({
  act: 'ground.edit',
  input: setRuleInput,
  run: async ({ ctx, tx, siteId, person, input, audit }) => {
    const plotRow = await getPlotInSite(tx, siteId, input.plotId);
    const [rule] = await tx
      .insert(reminderRule)
      .values({ siteId, plotId: plotRow.id, kind: input.kind, active: input.active, createdBy: person.id })
      .onConflictDoUpdate({
        target: [reminderRule.siteId, reminderRule.plotId, reminderRule.kind],
        set: { active: input.active },
      })
      .returning({ id: reminderRule.id });
    if (!rule) throw new Error('The reminder rule was not written.');
    await refreshReminders(tx, ctx, siteId, plotRow.id);
    await audit({
      act: 'reminder.rule',
      objectKind: 'reminder-rule',
      objectId: rule.id,
      detail: { plotId: plotRow.id, kind: input.kind, active: input.active },
    });
    return { id: rule.id };
  },
});
