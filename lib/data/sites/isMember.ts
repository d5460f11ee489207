import { and, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { membership } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';

export async function isMember(tx: Transaction, siteId: SiteId, personId: string): Promise<boolean> {
  const rows = await tx
    .select({ id: membership.id })
    .from(membership)
    .where(and(eq(membership.siteId, siteId), eq(membership.personId, personId)))
    .limit(1);
  return rows.length > 0;
}
