import { and, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { laboratory } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import { notFound } from '@/lib/errors';
import type { Laboratory } from '@/lib/schemas/reports';

export async function getLaboratoryInSite(tx: Transaction, siteId: SiteId, id: string): Promise<Laboratory> {
  const rows = await tx
    .select({ id: laboratory.id, name: laboratory.name, otherSpellings: laboratory.otherSpellings })
    .from(laboratory)
    .where(and(eq(laboratory.siteId, siteId), eq(laboratory.id, id)))
    .limit(1);
  const row = rows[0];
  if (!row) throw notFound();
  return row;
}
