import { inArray } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { person } from '@/db/schema';

export type Contact = { name: string; email: string };

export async function contactsOf(tx: Transaction, ids: readonly string[]): Promise<Map<string, Contact>> {
  if (ids.length === 0) return new Map();
  const rows = await tx
    .select({ id: person.id, name: person.name, email: person.email })
    .from(person)
    .where(inArray(person.id, [...new Set(ids)]));
  return new Map(rows.map(({ id, ...contact }) => [id, contact]));
}
