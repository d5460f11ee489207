import { and, eq, or, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { laboratory } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';

const tidy = (name: string) => name.replace(/\s+/g, ' ').trim().slice(0, 120);

/** By its name or by another spelling seen before; a name never seen makes a laboratory. Two at once make one. */
export async function findOrMakeLaboratory(tx: Transaction, siteId: SiteId, printed: string): Promise<string | null> {
  const name = tidy(printed);
  if (name === '') return null;
  const known = () =>
    tx
      .select({ id: laboratory.id })
      .from(laboratory)
      .where(
        and(
          eq(laboratory.siteId, siteId),
          or(
            sql`lower(${laboratory.name}) = lower(${name})`,
            sql`lower(${name}) in (select lower(spelling) from unnest(${laboratory.otherSpellings}) as spelling)`,
          ),
        ),
      )
      .limit(1);
  const found = (await known())[0];
  if (found) return found.id;
  await tx.insert(laboratory).values({ siteId, name }).onConflictDoNothing();
  return (await known())[0]?.id ?? null;
}
