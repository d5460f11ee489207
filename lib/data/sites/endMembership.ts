import { and, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { membership } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import type { AuditEntry } from '../audit';
import { lastOwner, ownerRemains, queueForOwners } from './owners';

type Ending = { siteId: SiteId; memberId: string; act: 'member.removed' | 'member.left' };

/** Every later request looks the membership up, so access ends with this row. */
export async function endMembership(
  tx: Transaction,
  { siteId, memberId, act }: Ending,
  audit: (entry: AuditEntry) => Promise<void>,
): Promise<{ ok: true }> {
  await queueForOwners(tx, siteId);
  const [row] = await tx
    .delete(membership)
    .where(and(eq(membership.siteId, siteId), eq(membership.id, memberId), ownerRemains(siteId)))
    .returning();
  if (!row) throw lastOwner();
  await audit({
    act,
    objectKind: 'membership',
    objectId: row.id,
    detail: { personId: row.personId, role: row.role },
  });
  return { ok: true };
}
