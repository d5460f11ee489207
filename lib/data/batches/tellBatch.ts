import { and, eq, isNull } from 'drizzle-orm';
import { z } from 'zod';
import { uploadBatch, uploadBatchFile } from '@/db/schema';
import { asSiteId } from '@/lib/domain/ids';
import { idSchema } from '@/lib/schemas/parts';
import { tellSingleReport } from '../reports/tellSingleReport';
import { enqueue, withSite } from '../transaction';
import { workerVerb } from '../verb';
import { QUIET_MS, settleBatch } from './settleBatch';

/** Asked whenever something of a batch has moved, and once more after it was quiet. */
export const tellBatch = workerVerb({
  input: z.strictObject({ siteId: idSchema, id: idSchema, watch: z.boolean().optional() }),
  run: ({ ctx, input }): Promise<void> => {
    const siteId = asSiteId(input.siteId);
    return withSite(siteId, async (tx) => {
      const told = await settleBatch(tx, ctx, siteId, input.id);
      if (told || input.watch !== true) return;
      const [open] = await tx
        .select({ id: uploadBatch.id })
        .from(uploadBatch)
        .where(and(eq(uploadBatch.siteId, siteId), eq(uploadBatch.id, input.id), isNull(uploadBatch.readyAt)));
      if (!open) return;
      const startAfter = new Date(ctx.now.getTime() + QUIET_MS);
      await enqueue(tx, 'tell-batch', { siteId, id: input.id, watch: true }, { startAfter });
    });
  },
});

/** Asked when a report has been read or given up: the batches that hold it, or, for a file sent by itself, whoever sent it. */
export const tellReport = workerVerb({
  input: z.strictObject({ siteId: idSchema, id: idSchema }),
  run: ({ ctx, input }): Promise<void> => {
    const siteId = asSiteId(input.siteId);
    return withSite(siteId, async (tx) => {
      const batches = await tx
        .selectDistinct({ id: uploadBatchFile.batchId })
        .from(uploadBatchFile)
        .where(and(eq(uploadBatchFile.siteId, siteId), eq(uploadBatchFile.reportId, input.id)));
      for (const { id } of batches) await settleBatch(tx, ctx, siteId, id);
      if (batches.length === 0) await tellSingleReport(tx, ctx, siteId, input.id);
    });
  },
});
