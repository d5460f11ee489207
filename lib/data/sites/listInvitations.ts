import { desc, eq } from 'drizzle-orm';
import { invitation } from '@/db/schema';
import { nothingSchema } from '@/lib/schemas/parts';
import type { Invitation } from '@/lib/schemas/sites';
import { namesOf } from '../people/names';
import { siteVerb } from '../verb';

export const listInvitations = siteVerb({
  act: 'site.manage',
  input: nothingSchema,
  run: async ({ ctx, tx, siteId }): Promise<{ invitations: Invitation[] }> => {
    const rows = await tx
      .select()
      .from(invitation)
      .where(eq(invitation.siteId, siteId))
      .orderBy(desc(invitation.createdAt), desc(invitation.id))
      .limit(100);
    const names = await namesOf(
      tx,
      rows.map((row) => row.invitedBy),
    );
    return {
      invitations: rows.map((row) => ({
        id: row.id,
        email: row.email,
        role: row.role,
        state: row.state === 'open' && row.expiresAt <= ctx.now ? 'expired' : row.state,
        invitedBy: names.get(row.invitedBy) ?? 'somebody who has left',
        expiresAt: row.expiresAt.toISOString(),
        createdAt: row.createdAt.toISOString(),
      })),
    };
  },
});
