import { and, desc, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { type LessonRow, layoutMemory, site } from '@/db/schema';
import { isAnalyteKey, isMethodKey, isUnitKey } from '@/lib/domain/analytes';
import type { SiteId } from '@/lib/domain/ids';
import type { Lesson } from '@/lib/reading/memory/lessons';

export type StoredLayout = typeof layoutMemory.$inferSelect;

/** More confirmations of one laboratory than this add nothing: the newest decides. */
const MOST = 200;

/** What confirmations of this laboratory taught, newest first. */
export const loadLayouts = (tx: Transaction, siteId: SiteId, laboratory: string): Promise<StoredLayout[]> =>
  tx
    .select()
    .from(layoutMemory)
    .where(and(eq(layoutMemory.siteId, siteId), eq(layoutMemory.laboratory, laboratory)))
    .orderBy(desc(layoutMemory.learntAt), desc(layoutMemory.id))
    .limit(MOST);

/** A key that the registry no longer knows is left open rather than guessed. */
export const toLesson = (row: LessonRow): Lesson[] =>
  isAnalyteKey(row.analyte)
    ? [
        {
          ...row,
          analyte: row.analyte,
          method: row.method !== null && isMethodKey(row.method) ? row.method : null,
          unit: row.unit !== null && isUnitKey(row.unit) ? row.unit : null,
        },
      ]
    : [];

export async function zoneOfSite(tx: Transaction, siteId: SiteId): Promise<string> {
  const [row] = await tx.select({ zone: site.timeZone }).from(site).where(eq(site.id, siteId));
  return row?.zone ?? 'UTC';
}
