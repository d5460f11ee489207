import { inArray } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { person } from '@/db/schema';

/** Names for ids that a site's rows carry; whoever has left keeps the name, a deleted account has none. */
export async function namesOf(tx: Transaction, ids: readonly string[]): Promise<Map<string, string>> {
  const unique = [...new Set(ids)];
  if (unique.length === 0) return new Map();
  const rows = await tx.select({ id: person.id, name: person.name }).from(person).where(inArray(person.id, unique));
  return new Map(rows.map((row) => [row.id, row.name]));
}
