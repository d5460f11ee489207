import { and, eq, ne, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { reminder, reminderRule } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import type { Ctx } from '../context';
import { dueFor, factsForRules } from './factsForRules';

/**
 * Brings the open reminder of every rule of a plot in line with what is known now. Called in the transaction of whatever
 * changed it, so that a due day is never older than the facts behind it.
 */
export async function refreshReminders(tx: Transaction, ctx: Ctx, siteId: SiteId, plotId: string): Promise<void> {
  const rules = await tx
    .select()
    .from(reminderRule)
    .where(and(eq(reminderRule.siteId, siteId), eq(reminderRule.plotId, plotId)));
  if (rules.length === 0) return;
  const facts = (await factsForRules(tx, siteId, [plotId]))(plotId);
  for (const rule of rules) {
    const due = rule.active ? dueFor(rule.kind, facts) : null;
    const ofRule = and(eq(reminder.siteId, siteId), eq(reminder.ruleId, rule.id), eq(reminder.state, 'open'));
    await tx
      .update(reminder)
      .set({ state: 'dismissed', closedAt: ctx.now, closedBy: null })
      .where(due?.ok ? and(ofRule, ne(reminder.dueOn, due.dueOn)) : ofRule);
    if (!due?.ok) continue;
    // A day that the rule itself gave up comes back; one that a person closed stays closed.
    await tx
      .insert(reminder)
      .values({ siteId, ruleId: rule.id, plotId, dueOn: due.dueOn, reason: due.sentence })
      .onConflictDoUpdate({
        target: [reminder.siteId, reminder.ruleId, reminder.dueOn],
        set: { state: 'open', closedAt: null, reason: due.sentence },
        setWhere: sql`${reminder.state} = 'dismissed' and ${reminder.closedBy} is null`,
      });
  }
}
