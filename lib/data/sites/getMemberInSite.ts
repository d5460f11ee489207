import { and, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { membership } from '@/db/schema';
import type { MembershipId, SiteId } from '@/lib/domain/ids';
import { notFound } from '@/lib/errors';

export async function getMemberInSite(tx: Transaction, siteId: SiteId, id: MembershipId) {
  const [row] = await tx
    .select()
    .from(membership)
    .where(and(eq(membership.siteId, siteId), eq(membership.id, id)))
    .limit(1);
  if (!row) throw notFound();
  return row;
}
