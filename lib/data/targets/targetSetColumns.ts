import type { Transaction } from '@/db/client';
import type { SiteId } from '@/lib/domain/ids';
import { Problem } from '@/lib/errors';
import { builtInSets } from './builtInSets';
import { loadOwnSets } from './loadOwnSets';

/** What a plot or planting stores for the set it names: the key, and for an own set the version that was newest then. */
export async function targetSetColumns(
  tx: Transaction,
  siteId: SiteId,
  key: string | null,
): Promise<{ targetSetKey: string | null; targetSetId: string | null }> {
  if (key === null) return { targetSetKey: null, targetSetId: null };
  if (builtInSets().some((set) => set.key === key)) return { targetSetKey: key, targetSetId: null };
  const [own] = await loadOwnSets(tx, siteId, key);
  if (own) return { targetSetKey: key, targetSetId: own.id };
  const sentence = 'This target set is not known here. Choose one from the list.';
  throw new Problem('invalid', sentence, { fields: { targetSetKey: sentence } });
}
