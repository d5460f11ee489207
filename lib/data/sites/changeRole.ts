import { and, eq, sql } from 'drizzle-orm';
import { membership } from '@/db/schema';
import { asMembershipId } from '@/lib/domain/ids';
import { changeRoleInput } from '@/lib/schemas/sites';
import { mayHere, siteVerb } from '../verb';
import { getMemberInSite } from './getMemberInSite';
import { lastOwner, ownerRemains, queueForOwners } from './owners';

export const changeRole = siteVerb({
  act: 'site.manage',
  input: changeRoleInput,
  run: async ({ ctx, tx, siteId, input, audit }) => {
    await queueForOwners(tx, siteId);
    // Asked again after the wait: whoever was before me may have taken my own right away.
    await mayHere(tx, ctx, siteId, 'site.manage');
    const before = await getMemberInSite(tx, siteId, asMembershipId(input.memberId));
    const [row] = await tx
      .update(membership)
      .set({ role: input.role })
      .where(
        and(
          eq(membership.siteId, siteId),
          eq(membership.id, before.id),
          sql`(${input.role} = 'owner' or ${ownerRemains(siteId)})`,
        ),
      )
      .returning({ id: membership.id });
    if (!row) throw lastOwner();
    if (before.role !== input.role) {
      await audit({
        act: 'member.role-changed',
        objectKind: 'membership',
        objectId: row.id,
        detail: { personId: before.personId, from: before.role, to: input.role },
      });
    }
    return { ok: true as const };
  },
});
