import { and, eq, isNull, type SQL, sql } from 'drizzle-orm';
import type { PgColumn } from 'drizzle-orm/pg-core';
import type { Transaction } from '@/db/client';
import { result, sample } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import type { Ctx } from '../context';
import type { SampleColumns } from '../review/sampleStore';

type Bag = Pick<SampleColumns, 'sampleId' | 'depthFromCm' | 'depthToCm' | 'cores' | 'composite'> & {
  plotId: string;
  takenOn: string;
};

const same = (column: PgColumn, value: string | null): SQL => sql`${column} is not distinct from ${value}::numeric`;

async function hasLiveResults(tx: Transaction, siteId: SiteId, sampleId: string): Promise<boolean> {
  const rows = await tx
    .select({ id: result.id })
    .from(result)
    .where(and(eq(result.siteId, siteId), eq(result.sampleId, sampleId), isNull(result.supersededAt)))
    .limit(1);
  return rows.length > 0;
}

/**
 * The bag of a plot, day, depth and composite. One that a withdrawn confirmation left behind is put right in place, so
 * that a mistyped day does not stay as a bag of its own. The plot is held by the caller: two confirmations make one bag.
 */
export async function findOrMakeSample(tx: Transaction, siteId: SiteId, ctx: Ctx, bag: Bag): Promise<string> {
  const [known] = await tx
    .select({ id: sample.id })
    .from(sample)
    .where(
      and(
        eq(sample.siteId, siteId),
        eq(sample.plotId, bag.plotId),
        eq(sample.takenOn, bag.takenOn),
        eq(sample.composite, bag.composite),
        same(sample.depthFromCm, bag.depthFromCm),
        same(sample.depthToCm, bag.depthToCm),
      ),
    )
    .limit(1);
  const facts = {
    plotId: bag.plotId,
    takenOn: bag.takenOn,
    depthFromCm: bag.depthFromCm,
    depthToCm: bag.depthToCm,
    composite: bag.composite,
    ...(bag.cores === null ? {} : { cores: bag.cores }),
  };
  const left = known ? null : bag.sampleId;
  const kept = known?.id ?? (left !== null && !(await hasLiveResults(tx, siteId, left)) ? left : null);
  if (kept !== null) {
    await tx
      .update(sample)
      .set(facts)
      .where(and(eq(sample.siteId, siteId), eq(sample.id, kept)));
    return kept;
  }
  const [made] = await tx
    .insert(sample)
    .values({ siteId, ...facts, createdAt: ctx.now })
    .returning({ id: sample.id });
  if (!made) throw new Error('The sample was not written.');
  return made.id;
}
