import { and, eq, gt, isNull, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { type TokenPurpose, token } from '@/db/schema';
import { Problem } from '@/lib/errors';
import type { Ctx } from '../context';
import { hashSecret, newSecret } from './secrets';

const MINUTE_MS = 60_000;
export const VALID_MS = { 'verify-address': 24 * 60 * MINUTE_MS, 'reset-password': 30 * MINUTE_MS } as const;
export const VALID_WORDS = { 'verify-address': '24 hours', 'reset-password': '30 minutes' } as const;

type LinkPurpose = keyof typeof VALID_MS;
export type TokenRow = typeof token.$inferSelect;

const gone = () =>
  new Problem('gone', 'This link was used already, has run out, or was replaced by a newer one. Ask for a new mail.');

const open = (purpose: TokenPurpose, secret: string, now: Date) =>
  and(eq(token.id, hashSecret(secret)), eq(token.purpose, purpose), isNull(token.usedAt), gt(token.expiresAt, now));

/** The secret goes into the mail and nowhere else; the row keeps its hash. */
export async function issueToken(
  tx: Transaction,
  ctx: Ctx,
  purpose: LinkPurpose,
  person: { id: string; email: string },
  payload: Record<string, string> = {},
): Promise<{ secret: string; id: string }> {
  const secret = newSecret(ctx);
  const id = hashSecret(secret);
  await tx.insert(token).values({
    id,
    personId: person.id,
    purpose,
    email: person.email,
    payload,
    expiresAt: new Date(ctx.now.getTime() + VALID_MS[purpose]),
    createdAt: ctx.now,
  });
  return { secret, id };
}

/** Looking changes nothing: mail scanners follow links. */
export async function lookAtToken(tx: Transaction, ctx: Ctx, purpose: LinkPurpose, secret: string): Promise<TokenRow> {
  const [row] = await tx
    .select()
    .from(token)
    .where(open(purpose, secret, ctx.now))
    .limit(1);
  if (!row) throw gone();
  return row;
}

/** Uses it up; of two at once one wins, the other is told it is gone. */
export async function takeToken(tx: Transaction, ctx: Ctx, purpose: LinkPurpose, secret: string): Promise<TokenRow> {
  const [row] = await tx
    .update(token)
    .set({ usedAt: ctx.now })
    .where(open(purpose, secret, ctx.now))
    .returning();
  if (!row) throw gone();
  return row;
}

/** Ends every link of a kind, and lets go of what travelled with them: the hash of a password typed at a sign-up. */
export async function dropTokens(tx: Transaction, ctx: Ctx, personId: string, purpose: LinkPurpose): Promise<void> {
  await tx
    .update(token)
    .set({ usedAt: sql`coalesce(${token.usedAt}, ${ctx.now.toISOString()})`, payload: {} })
    .where(and(eq(token.personId, personId), eq(token.purpose, purpose)));
}

export const goneLink = gone;
