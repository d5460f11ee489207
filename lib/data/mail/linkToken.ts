import { and, eq, gt, isNull } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { person, type TokenPurpose, token } from '@/db/schema';
import { Problem } from '@/lib/errors';
import type { Ctx } from '../context';
import { hashSecret } from '../people/secrets';

/** A link from a letter that may be used more than once until it ends. One answer for unknown, ended and other-purpose links. */
export async function readLinkToken(tx: Transaction, ctx: Ctx, secret: string, purpose: TokenPurpose) {
  const [row] = await tx
    .select({ personId: token.personId, payload: token.payload, name: person.name, timeZone: person.timeZone })
    .from(token)
    .innerJoin(person, eq(person.id, token.personId))
    .where(
      and(
        eq(token.id, hashSecret(secret)),
        eq(token.purpose, purpose),
        gt(token.expiresAt, ctx.now),
        isNull(person.disabledAt),
      ),
    );
  if (!row)
    throw new Problem(
      'gone',
      'This link no longer works. Newer letters carry a fresh one; your account page has the same choices.',
    );
  return row;
}
