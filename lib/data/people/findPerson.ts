import { sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { person } from '@/db/schema';

export type PersonRow = typeof person.$inferSelect;

export async function findPerson(tx: Transaction, email: string): Promise<PersonRow | undefined> {
  const [row] = await tx.select().from(person).where(sql`lower(${person.email}) = ${email.toLowerCase()}`).limit(1);
  return row;
}
