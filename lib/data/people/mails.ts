import type { Transaction } from '@/db/client';
import { addressTaken } from '@/lib/emails/address-taken';
import { passwordChanged } from '@/lib/emails/password-changed';
import { resetPassword } from '@/lib/emails/reset-password';
import { verifyAddress } from '@/lib/emails/verify-address';
import type { Ctx } from '../context';
import { appUrl, queueMail } from '../mail/queueMail';
import { issueToken, VALID_WORDS } from './tokens';

type To = { id: string; name: string; email: string };

export async function mailVerification(
  tx: Transaction,
  ctx: Ctx,
  to: To,
  payload: Record<string, string>,
): Promise<void> {
  const { secret, id } = await issueToken(tx, ctx, 'verify-address', to, payload);
  const message = await verifyAddress({
    name: to.name,
    verifyUrl: appUrl(`/verify/${secret}`),
    validFor: VALID_WORDS['verify-address'],
  });
  await queueMail(tx, { personId: to.id, to: to.email, kind: 'verify-address', dedupeKey: id, message });
}

/** At most one an hour: whoever keeps trying somebody's address must not fill their mailbox. */
export async function mailAddressTaken(tx: Transaction, ctx: Ctx, to: To): Promise<void> {
  const message = await addressTaken({
    name: to.name,
    signInUrl: appUrl('/sign-in'),
    resetUrl: appUrl('/reset'),
  });
  const dedupeKey = ctx.now.toISOString().slice(0, 13);
  await queueMail(tx, { personId: to.id, to: to.email, kind: 'address-taken', dedupeKey, message });
}

export async function mailReset(tx: Transaction, ctx: Ctx, to: To): Promise<void> {
  const { secret, id } = await issueToken(tx, ctx, 'reset-password', to);
  const message = await resetPassword({
    name: to.name,
    resetUrl: appUrl(`/reset/${secret}`),
    validFor: VALID_WORDS['reset-password'],
  });
  await queueMail(tx, { personId: to.id, to: to.email, kind: 'reset-password', dedupeKey: id, message });
}

export async function mailPasswordChanged(
  tx: Transaction,
  ctx: Ctx,
  to: To & { timeZone: string; locale: string },
  signedOut: 'all' | 'others' | 'none',
): Promise<void> {
  const moment = new Intl.DateTimeFormat(to.locale, {
    dateStyle: 'long',
    timeStyle: 'short',
    timeZone: to.timeZone,
  }).format(ctx.now);
  const message = await passwordChanged({
    name: to.name,
    changedAt: `${moment} (${to.timeZone})`,
    signedOut,
    resetUrl: appUrl('/reset'),
  });
  const dedupeKey = ctx.now.toISOString();
  await queueMail(tx, { personId: to.id, to: to.email, kind: 'password-changed', dedupeKey, message });
}
