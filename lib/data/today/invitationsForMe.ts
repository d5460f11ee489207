import { Problem } from '@/lib/errors';
import type { Today } from '@/lib/schemas/today';
import type { Ctx, SignedIn } from '../context';
import { lettersTo } from '../mail/lettersTo';
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
  const since = new Date(ctx.now.getTime() - VALID_MS);
  const letters = await withPeople((tx) =>
    lettersTo(tx, { address: person.email, kind: 'invitation', since, most: MOST }),
  );
  const found: Today['invitations'] = [];
  for (const text of letters) {
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
