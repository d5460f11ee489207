import { sql } from 'drizzle-orm';
import type { PersonId } from '@/lib/domain/ids';
import { Problem } from '@/lib/errors';
import { withPeople } from '../transaction';

/**
 * Reads every site of a person in a transaction of its own; the ids come from the one function that may look across
 * sites, so that no query ever sees the rows of two.
 */
export async function eachOfMySites<T>(person: { id: PersonId }, read: (siteId: string) => Promise<T>): Promise<T[]> {
  const ids = await withPeople((tx) => tx.execute<{ id: string }>(sql`select sites_of_person(${person.id}) as id`));
  const found: T[] = [];
  for (const { id } of ids) {
    try {
      found.push(await read(id));
    } catch (error) {
      // Left or removed between the two reads: then it is not mine any more.
      if (!(error instanceof Problem && error.code === 'not-found')) throw error;
    }
  }
  return found;
}
