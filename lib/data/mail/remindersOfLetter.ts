import { eq, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { outboxItem } from '@/db/schema';
import { asSiteId, type SiteId } from '@/lib/domain/ids';

/** The reminders a letter carries, by the site they stand on. */
export async function remindersOfLetter(tx: Transaction, outboxId: string): Promise<Map<SiteId, string[]>> {
  const items = await tx
    .select({
      reminderId: outboxItem.reminderId,
      site: sql<string | null>`site_of_mail(${outboxItem.reminderId})`,
    })
    .from(outboxItem)
    .where(eq(outboxItem.outboxId, outboxId));
  const found = new Map<SiteId, string[]>();
  for (const { reminderId, site } of items) {
    if (!site) continue;
    const siteId = asSiteId(site);
    found.set(siteId, [...(found.get(siteId) ?? []), reminderId]);
  }
  return found;
}
