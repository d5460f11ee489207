import { eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { site } from '@/db/schema';
import { notFound } from '@/lib/errors';
import type { InvitationLook } from '@/lib/schemas/sites';
import type { Ctx } from '../context';
import { findPerson } from '../people/findPerson';
import { namesOf } from '../people/names';
import { openInvitation } from './openInvitation';

/** An open invitation in words; by the hash, so that whoever holds only a letter's key can show it and not answer it. */
export async function readInvitation(tx: Transaction, ctx: Ctx, tokenHash: string): Promise<InvitationLook> {
  const { siteId, row } = await openInvitation(tx, ctx, tokenHash);
  const [here] = await tx.select({ name: site.name }).from(site).where(eq(site.id, siteId));
  if (!here) throw notFound();
  const names = await namesOf(tx, [row.invitedBy]);
  const account = await findPerson(tx, row.email);
  const me = ctx.actor.kind === 'person' ? ctx.actor.person : null;
  const mine = me?.email.toLowerCase() === row.email.toLowerCase();
  return {
    siteName: here.name,
    role: row.role,
    invitedBy: names.get(row.invitedBy) ?? 'Somebody on the site',
    email: row.email,
    expiresAt: row.expiresAt.toISOString(),
    next: me ? (mine ? 'accept' : 'other-account') : account?.emailVerifiedAt ? 'sign-in' : 'sign-up',
  };
}
