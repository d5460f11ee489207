import { and, count, eq, gt, lte, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { invitation, site } from '@/db/schema';
import { ROLE_WORDS } from '@/lib/access/words';
import type { SiteId } from '@/lib/domain/ids';
import { invitation as invitationMail } from '@/lib/emails/invitation';
import { notFound, Problem } from '@/lib/errors';
import { inviteInput } from '@/lib/schemas/sites';
import { appUrl, queueMail } from '../mail/queueMail';
import { findPerson } from '../people/findPerson';
import { hashSecret, newSecret } from '../people/secrets';
import { siteVerb } from '../verb';
import { isMember } from './isMember';

const DAY_MS = 24 * 3600 * 1000;
const VALID_MS = 7 * DAY_MS;
const A_DAY = 40;

/** Anyone can open a site, so invitations must not become a way to send mail to strangers in bulk. */
async function assertBelowDailyLimit(tx: Transaction, siteId: SiteId, now: Date): Promise<void> {
  const [sent] = await tx
    .select({ n: count() })
    .from(invitation)
    .where(and(eq(invitation.siteId, siteId), gt(invitation.createdAt, new Date(now.getTime() - DAY_MS))));
  if ((sent?.n ?? 0) >= A_DAY) {
    throw new Problem('too-many', `A site sends at most ${A_DAY} invitations a day. Send the next ones tomorrow.`, {
      retryAfterSeconds: 3600,
    });
  }
}

export const invite = siteVerb({
  act: 'site.manage',
  input: inviteInput,
  run: async ({ ctx, tx, siteId, person, input, audit }) => {
    // Invitations of a site queue here: many at once would each find the day's number not reached.
    const [here] = await tx
      .select({ name: site.name, timeZone: site.timeZone })
      .from(site)
      .where(eq(site.id, siteId))
      .for('no key update');
    if (!here) throw notFound();
    const known = await findPerson(tx, input.email);
    if (known && (await isMember(tx, siteId, known.id))) {
      throw new Problem('conflict', `${input.email} is on this site already.`, { reason: 'member-already' });
    }
    await assertBelowDailyLimit(tx, siteId, ctx.now);
    const sameAddress = sql`lower(${invitation.email}) = ${input.email.toLowerCase()}`;
    await tx
      .update(invitation)
      .set({ state: 'revoked', answeredAt: ctx.now })
      .where(
        and(
          eq(invitation.siteId, siteId),
          sameAddress,
          eq(invitation.state, 'open'),
          lte(invitation.expiresAt, ctx.now),
        ),
      );
    const secret = newSecret(ctx);
    const tokenHash = hashSecret(secret);
    const expiresAt = new Date(ctx.now.getTime() + VALID_MS);
    const [row] = await tx
      .insert(invitation)
      .values({
        siteId,
        email: input.email,
        role: input.role,
        tokenHash,
        invitedBy: person.id,
        expiresAt,
        createdAt: ctx.now,
      })
      .onConflictDoNothing()
      .returning({ id: invitation.id });
    if (!row) {
      throw new Problem('conflict', `An invitation to ${input.email} is still open. Take it back to send another.`, {
        reason: 'invited-already',
      });
    }
    const words = ROLE_WORDS[input.role];
    const message = await invitationMail({
      inviterName: person.name,
      siteName: here.name,
      roleWords: words.a,
      roleMeaning: words.may,
      acceptUrl: appUrl(`/invitation/${secret}`),
      declineUrl: appUrl(`/invitation/${secret}?answer=no`),
      expiresOn: new Intl.DateTimeFormat('en-GB', { dateStyle: 'long', timeZone: here.timeZone }).format(expiresAt),
    });
    // The key names the invitation to whoever shows it later; the secret leaves with the letter.
    await queueMail(tx, { personId: null, to: input.email, kind: 'invitation', dedupeKey: tokenHash, message });
    await audit({
      act: 'invitation.sent',
      objectKind: 'invitation',
      objectId: row.id,
      detail: { role: input.role },
    });
    return { id: row.id };
  },
});
