import { and, desc, eq, isNull, ne, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { application, type ReminderRuleKind, reminder, reminderRule, result, sample, site } from '@/db/schema';
import { asDay } from '@/lib/domain/days';
import type { SiteId } from '@/lib/domain/ids';
import { nextDue } from '@/lib/domain/reminders';
import type { Ctx } from '../context';

/** A bag whose results were all withdrawn was never a test; one that has none yet is on its way to be one. */
const stillCounts = sql`(exists (select from ${result} where ${result.siteId} = ${sample.siteId} and ${result.sampleId} = ${sample.id} and ${result.supersededAt} is null)
  or not exists (select from ${result} where ${result.siteId} = ${sample.siteId} and ${result.sampleId} = ${sample.id}))`;

export async function factsForRules(tx: Transaction, siteId: SiteId, plotId: string) {
  const [place] = await tx.select({ warmMonths: site.warmMonths }).from(site).where(eq(site.id, siteId));
  const samples = await tx
    .select({ takenOn: sample.takenOn })
    .from(sample)
    .where(and(eq(sample.siteId, siteId), eq(sample.plotId, plotId), stillCounts))
    .orderBy(desc(sample.takenOn))
    .limit(1);
  const spread = await tx
    .select({ appliedOn: application.appliedOn, material: application.material })
    .from(application)
    .where(and(eq(application.siteId, siteId), eq(application.plotId, plotId), isNull(application.supersededAt)))
    .orderBy(desc(application.appliedOn));
  return {
    warmMonths: place?.warmMonths ?? [],
    lastSampleOn: samples[0] ? asDay(samples[0].takenOn) : null,
    applications: spread.map((row) => ({ appliedOn: asDay(row.appliedOn), reaction: row.material.reaction })),
  };
}

export const dueFor = (kind: ReminderRuleKind, facts: Awaited<ReturnType<typeof factsForRules>>) =>
  nextDue({ kind, ...facts });

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
  const facts = await factsForRules(tx, siteId, plotId);
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
