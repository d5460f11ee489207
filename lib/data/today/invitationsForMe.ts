import { Problem } from '@/lib/errors';
import type { Today } from '@/lib/schemas/today';
import type { Ctx, SignedIn } from '../context';
import { lettersTo } from '../mail/lettersTo';
import { readInvitation } from '../sites/readInvitation';
import { withPeople } from '../transaction';

const VALID_MS = 7 * 24 * 3600 * 1000;
const MOST = 5;

/**
 * Open invitations to the address this person has proven to read. Which sites ask for somebody is behind the wall
 * between sites; the letters sent to one's own address are not. Answering takes the link, which is in the mailbox only.
 */
export async function invitationsForMe(ctx: Ctx, person: SignedIn): Promise<Today['invitations']> {
  if (!person.verified) return [];
  const since = new Date(ctx.now.getTime() - VALID_MS);
  const keys = await withPeople((tx) =>
    lettersTo(tx, { address: person.email, kind: 'invitation', since, most: MOST }),
  );
  const found: Today['invitations'] = [];
  for (const key of keys) {
    try {
      const look = await withPeople((tx) => readInvitation(tx, ctx, key));
      if (look.next !== 'accept') continue;
      const { siteName, role, invitedBy, expiresAt } = look;
      found.push({ siteName, role, invitedBy, expiresAt });
    } catch (error) {
      // Answered, taken back or run out: nothing waits here.
      if (!(error instanceof Problem && (error.code === 'gone' || error.code === 'not-found'))) throw error;
    }
  }
  return found;
}
