import { and, desc, eq, inArray, isNull, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { application, type ReminderRuleKind, result, sample, site } from '@/db/schema';
import { asDay } from '@/lib/domain/days';
import type { SiteId } from '@/lib/domain/ids';
import { nextDue } from '@/lib/domain/reminders';

/** A bag whose results were all withdrawn was never a test; one that has none yet is on its way to be one. */
const stillCounts = sql`(exists (select from ${result} where ${result.siteId} = ${sample.siteId} and ${result.sampleId} = ${sample.id} and ${result.supersededAt} is null)
  or not exists (select from ${result} where ${result.siteId} = ${sample.siteId} and ${result.sampleId} = ${sample.id}))`;

type RuleFacts = Omit<Parameters<typeof nextDue>[0], 'kind'>;

/** What the rules of these plots count from; three queries, however many plots. */
export async function factsForRules(
  tx: Transaction,
  siteId: SiteId,
  plotIds: readonly string[],
): Promise<(plotId: string) => RuleFacts> {
  const ids = [...plotIds];
  const [place] = await tx.select({ warmMonths: site.warmMonths }).from(site).where(eq(site.id, siteId));
  const samples = await tx
    .selectDistinctOn([sample.plotId], { plotId: sample.plotId, takenOn: sample.takenOn })
    .from(sample)
    .where(and(eq(sample.siteId, siteId), inArray(sample.plotId, ids), stillCounts))
    .orderBy(sample.plotId, desc(sample.takenOn));
  const spread = await tx
    .select({ plotId: application.plotId, appliedOn: application.appliedOn, material: application.material })
    .from(application)
    .where(and(eq(application.siteId, siteId), inArray(application.plotId, ids), isNull(application.supersededAt)))
    .orderBy(desc(application.appliedOn));
  const lastSample = new Map(samples.map((row) => [row.plotId, asDay(row.takenOn)]));
  return (plotId) => ({
    warmMonths: place?.warmMonths ?? [],
    lastSampleOn: lastSample.get(plotId) ?? null,
    applications: spread
      .filter((row) => row.plotId === plotId)
      .map((row) => ({ appliedOn: asDay(row.appliedOn), reaction: row.material.reaction })),
  });
}

export const dueFor = (kind: ReminderRuleKind, facts: RuleFacts) => nextDue({ kind, ...facts });
