import { and, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { invitation } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import { Problem } from '@/lib/errors';
import type { Ctx } from '../context';
import { enterSite } from '../transaction';
import { siteOfInvitation } from './joinByInvitation';

const SENTENCES = {
  accepted: 'This invitation was accepted already. Sign in, and the site is in your list.',
  declined: 'This invitation was declined. If that was a slip, ask an owner of the site for another.',
  revoked: 'This invitation was taken back. Ask an owner of the site for another.',
  expired: 'This invitation has run out; they stand for 7 days. Ask an owner of the site for another.',
  unknown: 'This invitation is not known here. Copy all of the link from the mail, or ask for another.',
};

const gone = (why: keyof typeof SENTENCES) => new Problem('gone', SENTENCES[why], { reason: why });

/** By the hash of the link's secret; enters its site. Throws 410 with the reason when it can no longer be answered. */
export async function openInvitation(tx: Transaction, ctx: Ctx, tokenHash: string) {
  const siteId: SiteId | null = await siteOfInvitation(tx, tokenHash);
  if (!siteId) throw gone('unknown');
  await enterSite(tx, siteId);
  const [row] = await tx
    .select()
    .from(invitation)
    .where(and(eq(invitation.siteId, siteId), eq(invitation.tokenHash, tokenHash)));
  if (!row) throw gone('unknown');
  if (row.state !== 'open') throw gone(row.state);
  if (row.expiresAt <= ctx.now) throw gone('expired');
  return { siteId, row, answeredMeanwhile: () => gone('accepted') };
}
