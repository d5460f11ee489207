import { eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { site } from '@/db/schema';
import type { Role } from '@/lib/access/table';
import type { SiteId } from '@/lib/domain/ids';
import { notFound } from '@/lib/errors';
import type { Site } from '@/lib/schemas/sites';

export async function readSite(tx: Transaction, siteId: SiteId, role: Role): Promise<Site> {
  const [row] = await tx.select().from(site).where(eq(site.id, siteId)).limit(1);
  if (!row) throw notFound();
  return {
    id: row.id,
    name: row.name,
    country: row.country,
    hemisphere: row.hemisphere,
    timeZone: row.timeZone,
    warmMonths: row.warmMonths,
    planWidthM: Number(row.planWidthM),
    planHeightM: Number(row.planHeightM),
    role,
  };
}
