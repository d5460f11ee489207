import { eq, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { outboxItem } from '@/db/schema';
import { asSiteId, type SiteId } from '@/lib/domain/ids';

/** The reminders a letter carries, each with the site it stands on. */
export async function remindersOfLetter(
  tx: Transaction,
  outboxId: string,
): Promise<{ reminderId: string; siteId: SiteId }[]> {
  const items = await tx.select().from(outboxItem).where(eq(outboxItem.outboxId, outboxId));
  const found: { reminderId: string; siteId: SiteId }[] = [];
  for (const item of items) {
    const [row] = await tx.execute<{ site: string | null }>(sql`select site_of_mail(${item.reminderId}) as site`);
    if (row?.site) found.push({ reminderId: item.reminderId, siteId: asSiteId(row.site) });
  }
  return found;
}
