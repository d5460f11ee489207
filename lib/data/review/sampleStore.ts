import { and, eq, sql } from 'drizzle-orm';
import type { z } from 'zod';
import type { Transaction } from '@/db/client';
import { reportSample } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import { notFound, Problem } from '@/lib/errors';
import type { reviewSampleAnswerSchema } from '@/lib/schemas/review';

export type SampleColumns = typeof reportSample.$inferSelect;
export type SampleAnswer = z.infer<typeof reviewSampleAnswerSchema>;

export async function getSampleInReport(
  tx: Transaction,
  siteId: SiteId,
  reportId: string,
  id: string,
): Promise<SampleColumns> {
  const rows = await tx
    .select()
    .from(reportSample)
    .where(and(eq(reportSample.siteId, siteId), eq(reportSample.reportId, reportId), eq(reportSample.id, id)))
    .limit(1);
  const row = rows[0];
  if (!row) throw notFound();
  return row;
}

export const toSample = (row: SampleColumns): SampleAnswer => ({
  id: row.id,
  ordinal: row.ordinal,
  printedName: row.printedName,
  labNumber: row.labNumber,
  fieldName: row.fieldName,
  sampledPrinted: row.sampledPrinted,
  reportedOn: row.reportedOn,
  reportedPrinted: row.reportedPrinted,
  plotId: row.plotId,
  takenOn: row.takenOn,
  depthFromCm: row.depthFromCm,
  depthToCm: row.depthToCm,
  cores: row.cores,
  composite: row.composite,
  leftOutReason: row.leftOutReason,
  sameAsId: row.sameAsId,
  version: row.version,
});

type Change = Partial<Omit<typeof reportSample.$inferInsert, 'siteId' | 'id' | 'reportId' | 'version'>>;

/** Against the version that was on screen; a stale one answers with what stands there now. */
export async function writeSample(
  tx: Transaction,
  siteId: SiteId,
  at: { reportId: string; reportSampleId: string; version: number },
  change: Change,
): Promise<SampleColumns> {
  const [row] = await tx
    .update(reportSample)
    .set({ ...change, version: sql`${reportSample.version} + 1` })
    .where(
      and(
        eq(reportSample.siteId, siteId),
        eq(reportSample.reportId, at.reportId),
        eq(reportSample.id, at.reportSampleId),
        eq(reportSample.version, at.version),
      ),
    )
    .returning();
  if (row) return row;
  const current = toSample(await getSampleInReport(tx, siteId, at.reportId, at.reportSampleId));
  throw new Problem('conflict', 'Somebody changed this sample while you had it open. Yours was not saved yet.', {
    reason: 'stale-version',
    current,
  });
}
