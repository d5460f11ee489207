import { and, eq, gt, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { invitation, membership } from '@/db/schema';
import { asSiteId, type SiteId } from '@/lib/domain/ids';
import { audit } from '../audit';
import type { Ctx } from '../context';
import { enterSite } from '../transaction';

type Joining = { id: string; email: string };

export async function siteOfInvitation(tx: Transaction, tokenHash: string): Promise<SiteId | null> {
  const rows = await tx.execute<{ id: string | null }>(sql`select site_of_token(${tokenHash}) as id`);
  const id = rows[0]?.id;
  return id ? asSiteId(id) : null;
}

/** Uses the invitation up and makes the member, in the caller's transaction; null when it is not open for this address. */
export async function joinByInvitation(
  tx: Transaction,
  ctx: Ctx,
  tokenHash: string,
  person: Joining,
): Promise<SiteId | null> {
  const siteId = await siteOfInvitation(tx, tokenHash);
  if (!siteId) return null;
  await enterSite(tx, siteId);
  const [row] = await tx
    .update(invitation)
    .set({ state: 'accepted', answeredAt: ctx.now })
    .where(
      and(
        eq(invitation.siteId, siteId),
        eq(invitation.tokenHash, tokenHash),
        eq(invitation.state, 'open'),
        gt(invitation.expiresAt, ctx.now),
        sql`lower(${invitation.email}) = ${person.email.toLowerCase()}`,
      ),
    )
    .returning({ id: invitation.id, role: invitation.role });
  if (!row) return null;
  await tx
    .insert(membership)
    .values({ siteId, personId: person.id, role: row.role, createdAt: ctx.now })
    .onConflictDoNothing();
  await audit(tx, ctx, siteId, {
    act: 'invitation.accepted',
    objectKind: 'invitation',
    objectId: row.id,
    detail: { personId: person.id, role: row.role },
  });
  return siteId;
}
