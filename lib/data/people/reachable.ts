import { and, eq, isNotNull, isNull } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { person } from '@/db/schema';

/** Somebody who can be written to: address verified, account open. */
export async function reachable(tx: Transaction, personId: string) {
  const [row] = await tx
    .select({ id: person.id, name: person.name, email: person.email, timeZone: person.timeZone })
    .from(person)
    .where(and(eq(person.id, personId), isNotNull(person.emailVerifiedAt), isNull(person.disabledAt)))
    .limit(1);
  return row ?? null;
}
