import type { Transaction } from '@/db/client';
import type { SiteId } from '@/lib/domain/ids';
import { applyMemory, type LearntReading } from '@/lib/reading/memory/apply';
import { findLayout, layoutOf } from '@/lib/reading/memory/layout';
import { memoryOf } from '@/lib/reading/memory/lessons';
import type { Reading } from '@/lib/reading/types';
import { dayOf } from '../days';
import { loadLayouts, toLesson, zoneOfSite } from './storedLayouts';

/** A reading with what this site's own confirmations of its layout taught, and the name the layout goes by here. */
export async function recallLayout(
  tx: Transaction,
  siteId: SiteId,
  reading: Reading,
): Promise<{ reading: LearntReading; fingerprint: string | null }> {
  const layout = layoutOf({
    laboratory: reading.lab.name,
    samples: reading.samples.map((sample) => sample.results),
  });
  if (layout === null) return { reading, fingerprint: null };
  const stored = await loadLayouts(tx, siteId, layout.laboratory);
  const known = findLayout(layout, stored);
  if (known === null) return { reading, fingerprint: layout.fingerprint };
  const zone = await zoneOfSite(tx, siteId);
  const memory = memoryOf(
    stored
      .filter((one) => one.fingerprint === known.fingerprint)
      .map((one) => ({ on: dayOf(one.learntAt, zone), lessons: one.lessons.flatMap(toLesson) })),
  );
  return { reading: applyMemory(reading, memory), fingerprint: known.fingerprint };
}
