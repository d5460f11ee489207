import { and, eq, inArray, isNotNull, isNull } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { mailPreference, person } from '@/db/schema';

export type MailReader = {
  id: string;
  name: string;
  email: string;
  units: 'us' | 'metric';
  timeZone: string;
  mailHour: number;
};

/** Of these people, those who can be written to about this kind of mail: address verified, account open, not unsubscribed. */
export async function mailReaders(tx: Transaction, ids: readonly string[], kind: string): Promise<MailReader[]> {
  if (ids.length === 0) return [];
  const rows = await tx
    .select({
      id: person.id,
      name: person.name,
      email: person.email,
      units: person.units,
      timeZone: person.timeZone,
      mailHour: person.mailHour,
      wanted: mailPreference.wanted,
    })
    .from(person)
    .leftJoin(mailPreference, and(eq(mailPreference.personId, person.id), eq(mailPreference.kind, kind)))
    .where(and(inArray(person.id, [...ids]), isNotNull(person.emailVerifiedAt), isNull(person.disabledAt)));
  return rows.filter((row) => row.wanted !== false).map(({ wanted: _, ...reader }) => reader);
}
