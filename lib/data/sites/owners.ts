import { eq, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { membership, site } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import { Problem } from '@/lib/errors';

/** Whoever takes ownership away queues here: two owners leaving at once would otherwise each see the other still there. */
export async function queueForOwners(tx: Transaction, siteId: SiteId): Promise<void> {
  await tx.select({ id: site.id }).from(site).where(eq(site.id, siteId)).for('no key update');
}

/** True in SQL when this row is no owner, or another owner remains. */
export const ownerRemains = (siteId: SiteId) =>
  sql`(${membership.role} <> 'owner' or exists (
    select from membership other
    where other.site_id = ${siteId} and other.role = 'owner' and other.id <> ${membership.id}))`;

export const lastOwner = () =>
  new Problem('conflict', 'A site always has an owner, and this is the last one. Make somebody else an owner first.', {
    reason: 'last-owner',
  });
