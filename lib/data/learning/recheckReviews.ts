import { and, asc, eq, inArray, ne, or } from 'drizzle-orm';
import { z } from 'zod';
import type { Transaction } from '@/db/client';
import { report, reportSample } from '@/db/schema';
import { asSiteId, type SiteId } from '@/lib/domain/ids';
import { idSchema } from '@/lib/schemas/parts';
import { refreshHistoryDoubts } from '../review/refreshHistoryDoubts';
import { withSite } from '../transaction';
import { workerVerb } from '../verb';
import { recallRows } from './recallRows';

const MOST = 300;

type Around = { fingerprint: string | null; plotIds: string[] };

const given = (ids: readonly (string | null)[]): string[] => [...new Set(ids)].filter((id) => id !== null);

async function aroundOf(tx: Transaction, siteId: SiteId, id: string): Promise<Around> {
  const [row] = await tx
    .select({ fingerprint: report.layoutFingerprint })
    .from(report)
    .where(and(eq(report.siteId, siteId), eq(report.id, id)));
  const samples = await tx
    .select({ plotId: reportSample.plotId })
    .from(reportSample)
    .where(and(eq(reportSample.siteId, siteId), eq(reportSample.reportId, id)));
  return { fingerprint: row?.fingerprint ?? null, plotIds: given(samples.map((one) => one.plotId)) };
}

/** Open reviews of the same layout or with a sample of the same plots. */
async function openReviews(tx: Transaction, siteId: SiteId, id: string, { fingerprint, plotIds }: Around) {
  const onPlots = tx
    .select({ id: reportSample.reportId })
    .from(reportSample)
    .where(and(eq(reportSample.siteId, siteId), inArray(reportSample.plotId, plotIds)));
  const near = [
    fingerprint === null ? undefined : eq(report.layoutFingerprint, fingerprint),
    plotIds.length === 0 ? undefined : inArray(report.id, onPlots),
  ].filter((one) => one !== undefined);
  if (near.length === 0) return [];
  const rows = await tx
    .select({ id: report.id })
    .from(report)
    .where(and(eq(report.siteId, siteId), ne(report.id, id), eq(report.state, 'in-review'), or(...near)))
    .orderBy(asc(report.uploadedAt), asc(report.id))
    .limit(MOST);
  return rows.map((row) => row.id);
}

/**
 * After a confirmation or its withdrawal: reviews that are open already are held against what is known now, so that of
 * many old years sent in together the second one profits from the first. A report confirmed meanwhile is left alone.
 */
export const recheckReviews = workerVerb({
  input: z.strictObject({ siteId: idSchema, id: idSchema }),
  run: async ({ input }): Promise<number> => {
    const siteId = asSiteId(input.siteId);
    const { around, ids } = await withSite(siteId, async (tx) => {
      const found = await aroundOf(tx, siteId, input.id);
      return { around: found, ids: await openReviews(tx, siteId, input.id, found) };
    });
    for (const id of ids) {
      await withSite(siteId, async (tx) => {
        const [row] = await tx
          .select()
          .from(report)
          .where(and(eq(report.siteId, siteId), eq(report.id, id), eq(report.state, 'in-review')))
          .for('share');
        if (!row) return;
        if (around.fingerprint !== null && row.layoutFingerprint === around.fingerprint)
          await recallRows(tx, siteId, row);
        const samples = await tx
          .select({ id: reportSample.id })
          .from(reportSample)
          .where(and(eq(reportSample.siteId, siteId), eq(reportSample.reportId, id)));
        await refreshHistoryDoubts(
          tx,
          siteId,
          samples.map((sample) => sample.id),
          'untouched',
        );
      });
    }
    return ids.length;
  },
});
