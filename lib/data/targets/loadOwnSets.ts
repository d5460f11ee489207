import { and, asc, desc, eq, inArray } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { target, targetSet } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import type { OwnTargetSet } from '@/lib/schemas/targets';

/** The newest version of each of the site's own sets, or of the one named. */
export async function loadOwnSets(tx: Transaction, siteId: SiteId, key?: string): Promise<OwnTargetSet[]> {
  const newest = await tx
    .selectDistinctOn([targetSet.key])
    .from(targetSet)
    .where(and(eq(targetSet.siteId, siteId), key === undefined ? undefined : eq(targetSet.key, key)))
    .orderBy(asc(targetSet.key), desc(targetSet.version));
  if (newest.length === 0) return [];
  const ids = newest.map((set) => set.id);
  const bands = await tx
    .select()
    .from(target)
    .where(and(eq(target.siteId, siteId), inArray(target.targetSetId, ids)))
    .orderBy(asc(target.analyte));
  return newest
    .map((set) => ({
      key: set.key,
      id: set.id,
      version: set.version,
      name: set.name,
      validFrom: set.validFrom,
      bands: bands
        .filter((band) => band.targetSetId === set.id)
        .map(({ analyte, low, high, unit, method }) => ({ analyte, low, high, unit, method })),
    }))
    .sort((a, b) => a.name.localeCompare(b.name, 'en'));
}
