import { and, desc, eq, gt, inArray } from 'drizzle-orm';
import { outbox } from '@/db/schema';
import { Problem } from '@/lib/errors';
import type { Today } from '@/lib/schemas/today';
import type { Ctx, SignedIn } from '../context';
import { lookAtInvitation } from '../sites/lookAtInvitation';
import { withPeople } from '../transaction';

const VALID_MS = 7 * 24 * 3600 * 1000;
const MOST = 5;

/**
 * Open invitations to the address this person has proven to read. Which sites ask for somebody is behind the wall
 * between sites; the letters sent to one's own address are not, and each carries its link.
 */
export async function invitationsForMe(ctx: Ctx, person: SignedIn): Promise<Today['invitations']> {
  if (!person.verified) return [];
  const letters = await withPeople((tx) =>
    tx
      .select({ text: outbox.text })
      .from(outbox)
      .where(
        and(
          inArray(outbox.toAddress, [...new Set([person.email, person.email.toLowerCase()])]),
          eq(outbox.kind, 'invitation'),
          gt(outbox.createdAt, new Date(ctx.now.getTime() - VALID_MS)),
        ),
      )
      .orderBy(desc(outbox.createdAt))
      .limit(MOST),
  );
  const found: Today['invitations'] = [];
  for (const { text } of letters) {
    const token = /\/invitation\/([\w-]{43})/.exec(text)?.[1];
    if (!token) continue;
    try {
      const look = await lookAtInvitation({ ctx, input: { token } });
      if (look.next !== 'accept') continue;
      const { siteName, role, invitedBy, expiresAt } = look;
      found.push({ siteName, role, invitedBy, expiresAt, token });
    } catch (error) {
      // Answered, taken back or run out: nothing waits here.
      if (!(error instanceof Problem && (error.code === 'gone' || error.code === 'not-found'))) throw error;
    }
  }
  return found;
}
