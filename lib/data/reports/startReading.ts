import { and, eq, lt, or } from 'drizzle-orm';
import { z } from 'zod';
import { report } from '@/db/schema';
import { asSiteId } from '@/lib/domain/ids';
import { idSchema } from '@/lib/schemas/parts';
import { withSite } from '../transaction';
import { workerVerb } from '../verb';
import type { Lease } from './lease';

/** A worker that has held a file this long was killed: its job has run out as well (150 s). */
const LOST_AFTER_MS = 140_000;

/** Later writes of this reading name its lease, so that a worker thought lost cannot write over its successor. */
export type ReadingTask = { lease: Lease; fileKey: string; sha256: string; fileName: string; ownSheet: boolean };

/** received -> reading. Null: another worker has it, or there is nothing left to do. */
export const startReading = workerVerb({
  input: z.strictObject({ siteId: idSchema, id: idSchema }),
  run: async ({ ctx, input }): Promise<ReadingTask | null> =>
    withSite(asSiteId(input.siteId), async (tx) => {
      const lost = new Date(ctx.now.getTime() - LOST_AFTER_MS);
      const [row] = await tx
        .update(report)
        .set({
          state: 'reading',
          readingStartedAt: ctx.now,
          pagesRead: 0,
          refusalCode: null,
          refusalSentence: null,
        })
        .where(
          and(
            eq(report.siteId, input.siteId),
            eq(report.id, input.id),
            or(eq(report.state, 'received'), and(eq(report.state, 'reading'), lt(report.readingStartedAt, lost))),
          ),
        )
        .returning();
      if (!row?.fileKey || !row.sha256 || !row.fileName) return null;
      const lease = { siteId: input.siteId, id: input.id, started: ctx.now };
      return {
        lease,
        fileKey: row.fileKey,
        sha256: row.sha256,
        fileName: row.fileName,
        ownSheet: row.origin === 'own-sheet',
      };
    }),
});
