import { and, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { mailPreference } from '@/db/schema';

/** What a person chose about letters that say a report is read, and when; null while they chose nothing. */
export async function readyMailChoice(
  tx: Transaction,
  personId: string,
): Promise<{ wanted: boolean; changedAt: Date } | null> {
  const [row] = await tx
    .select({ wanted: mailPreference.wanted, changedAt: mailPreference.changedAt })
    .from(mailPreference)
    .where(and(eq(mailPreference.personId, personId), eq(mailPreference.kind, 'report-ready')))
    .limit(1);
  return row ?? null;
}
