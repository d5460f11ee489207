import type { z } from 'zod';
import type { Transaction } from '@/db/client';
import { target, targetSet } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import type { createTargetSetInput, OwnTargetSet } from '@/lib/schemas/targets';
import type { Ctx, SignedIn } from '../context';
import { dayOf } from '../days';
import { loadOwnSets } from './loadOwnSets';

type Tools = { tx: Transaction; ctx: Ctx; siteId: SiteId; person: SignedIn };

/** Writes one version of a set with its bands. A version, once written, is never changed: charts of past days draw it. */
export async function writeTargetSet(
  { tx, ctx, siteId, person }: Tools,
  key: string,
  version: number,
  input: z.output<typeof createTargetSetInput>,
): Promise<OwnTargetSet> {
  const [row] = await tx
    .insert(targetSet)
    .values({
      siteId,
      key,
      version,
      name: input.name,
      validFrom: input.validFrom ?? dayOf(ctx.now, person.timeZone),
      createdBy: person.id,
      createdAt: ctx.now,
    })
    .returning({ id: targetSet.id });
  if (!row) throw new Error('The target set was not written.');
  await tx.insert(target).values(
    input.bands.map((band) => ({
      siteId,
      targetSetId: row.id,
      analyte: band.analyte,
      low: String(band.low),
      high: String(band.high),
      unit: band.unit,
      method: band.method,
    })),
  );
  const [written] = await loadOwnSets(tx, siteId, key);
  if (!written) throw new Error('The target set was not written.');
  return written;
}
