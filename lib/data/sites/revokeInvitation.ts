import { and, eq } from 'drizzle-orm';
import { invitation } from '@/db/schema';
import { asInvitationId } from '@/lib/domain/ids';
import { notFound, Problem } from '@/lib/errors';
import { invitationInput } from '@/lib/schemas/sites';
import { siteVerb } from '../verb';

export const revokeInvitation = siteVerb({
  act: 'site.manage',
  input: invitationInput,
  run: async ({ ctx, tx, siteId, input, audit }) => {
    const here = and(eq(invitation.siteId, siteId), eq(invitation.id, asInvitationId(input.invitationId)));
    const [row] = await tx
      .update(invitation)
      .set({ state: 'revoked', answeredAt: ctx.now })
      .where(and(here, eq(invitation.state, 'open')))
      .returning({ id: invitation.id });
    if (!row) {
      const [answered] = await tx.select({ state: invitation.state }).from(invitation).where(here);
      if (!answered) throw notFound();
      throw new Problem('conflict', `This invitation was ${answered.state} already; nothing was changed.`, {
        reason: answered.state,
      });
    }
    await audit({ act: 'invitation.revoked', objectKind: 'invitation', objectId: row.id });
    return { ok: true as const };
  },
});
