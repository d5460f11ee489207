import { and, asc, eq, isNull } from 'drizzle-orm';
import { z } from 'zod';
import { plot, reminderRule } from '@/db/schema';
import { REMINDER_KINDS, type RuleAnswer } from '@/lib/schemas/reminders';
import { siteVerb } from '../verb';
import { dueFor, factsForRules } from './factsForRules';

/** Every plot with every kind of rule, set or not, and the day each would come due. */
export const listRules = siteVerb({
  act: 'site.read',
  input: z.strictObject({}),
  run: async ({ tx, siteId }) => {
    const plots = await tx
      .select({ id: plot.id, name: plot.name })
      .from(plot)
      .where(and(eq(plot.siteId, siteId), isNull(plot.archivedAt)))
      .orderBy(asc(plot.name));
    const set = await tx.select().from(reminderRule).where(eq(reminderRule.siteId, siteId));
    const factsOf = await factsForRules(
      tx,
      siteId,
      plots.map((one) => one.id),
    );
    const rules: RuleAnswer[] = [];
    for (const one of plots) {
      const facts = factsOf(one.id);
      for (const kind of REMINDER_KINDS) {
        const row = set.find((rule) => rule.plotId === one.id && rule.kind === kind);
        const due = dueFor(kind, facts);
        rules.push({
          id: row?.id ?? one.id,
          plotId: one.id,
          plotName: one.name,
          kind,
          active: row?.active ?? false,
          dueOn: due.ok ? due.dueOn : null,
          why: due.sentence,
        });
      }
    }
    return { rules };
  },
});
