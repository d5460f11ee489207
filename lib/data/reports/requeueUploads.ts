import { and, eq, inArray, lt, sql } from 'drizzle-orm';
import { report } from '@/db/schema';
import { asSiteId } from '@/lib/domain/ids';
import { nothingSchema } from '@/lib/schemas/parts';
import { database } from '../database';
import { enqueue, withSite } from '../transaction';
import { workerVerb } from '../verb';

const STALE_AFTER_MS = 180_000;
/** The next sweep takes the rest. */
const MOST = 200;

/**
 * Reports that wait for longer than three minutes are asked for once more: a job may be lost with a restored queue, a
 * worker with its machine. The moment written down keeps the next sweep from asking again at once.
 */
export const requeueUploads = workerVerb({
  input: nothingSchema,
  run: async ({ ctx }): Promise<number> => {
    const before = new Date(ctx.now.getTime() - STALE_AFTER_MS);
    const stale = await database().execute<{ site_id: string; report_id: string }>(
      sql`select site_id, report_id from stale_uploads(${before.toISOString()}::timestamptz) limit ${MOST}`,
    );
    let asked = 0;
    for (const { site_id: siteId, report_id: id } of stale) {
      asked += await withSite(asSiteId(siteId), async (tx) => {
        const rows = await tx
          .update(report)
          .set({ state: 'received', readingStartedAt: ctx.now })
          .where(
            and(
              eq(report.siteId, siteId),
              eq(report.id, id),
              inArray(report.state, ['received', 'reading']),
              lt(sql`coalesce(${report.readingStartedAt}, ${report.uploadedAt})`, before.toISOString()),
            ),
          )
          .returning({ id: report.id });
        if (rows.length > 0) await enqueue(tx, 'read-report', { siteId, id });
        return rows.length;
      });
    }
    return asked;
  },
});
