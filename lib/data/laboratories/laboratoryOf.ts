import type { Transaction } from '@/db/client';
import type { SiteId } from '@/lib/domain/ids';
import { findOrMakeLaboratory } from './findOrMakeLaboratory';
import { getLaboratoryInSite } from './getLaboratoryInSite';

/** A chosen laboratory, or one by its name; neither is no laboratory. */
export async function laboratoryOf(
  tx: Transaction,
  siteId: SiteId,
  input: { laboratoryId: string | null; laboratoryName: string | null },
): Promise<string | null> {
  if (input.laboratoryId) return (await getLaboratoryInSite(tx, siteId, input.laboratoryId)).id;
  return input.laboratoryName ? findOrMakeLaboratory(tx, siteId, input.laboratoryName) : null;
}
