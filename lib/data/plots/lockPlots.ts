import { and, asc, eq, inArray } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { plot } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import { notFound } from '@/lib/errors';

/** Holds the plots until the transaction ends, always in the same order, so that two writers wait instead of locking each other out. */
export async function lockPlots(tx: Transaction, siteId: SiteId, ids: readonly string[]): Promise<void> {
  const wanted = [...new Set(ids)];
  if (wanted.length === 0) return;
  const rows = await tx
    .select({ id: plot.id })
    .from(plot)
    .where(and(eq(plot.siteId, siteId), inArray(plot.id, wanted)))
    .orderBy(asc(plot.id))
    .for('update');
  if (rows.length !== wanted.length) throw notFound();
}
