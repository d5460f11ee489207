import { uploadBatch, uploadBatchFile } from '@/db/schema';
import { type BatchAnnounced, createBatchInput } from '@/lib/schemas/batches';
import { readyMailChoice } from '../people/readyMailChoice';
import { cleanFileName } from '../reports/cleanFileName';
import { enqueue } from '../transaction';
import { siteVerb } from '../verb';
import { QUIET_MS } from './settleBatch';

/** Names the files that are about to come, so that a reload or a closed browser loses none of them. */
export const createBatch = siteVerb({
  act: 'reading.work',
  input: createBatchInput,
  run: async ({ ctx, tx, siteId, person, input, audit }): Promise<BatchAnnounced> => {
    const choice = await readyMailChoice(tx, person.id);
    const [batch] = await tx
      .insert(uploadBatch)
      .values({
        siteId,
        createdBy: person.id,
        createdAt: ctx.now,
        mailWanted: choice?.wanted === true,
        mailChosenAt: ctx.now,
        movedAt: ctx.now,
      })
      .returning();
    if (!batch) throw new Error('The batch was not written.');
    const files = await tx
      .insert(uploadBatchFile)
      .values(
        input.files.map((file, at) => ({
          siteId,
          batchId: batch.id,
          ordinal: at + 1,
          fileName: cleanFileName(file.name),
          bytes: file.bytes,
          state: file.refusal === null ? ('announced' as const) : ('refused' as const),
          refusal: file.refusal,
        })),
      )
      .returning({ id: uploadBatchFile.id, ordinal: uploadBatchFile.ordinal });
    await audit({
      act: 'batch.begin',
      objectKind: 'batch',
      objectId: batch.id,
      detail: { files: files.length },
    });
    // A browser that is closed half-way sends no more; then the rest is not waited for for ever.
    const startAfter = new Date(ctx.now.getTime() + QUIET_MS);
    await enqueue(tx, 'tell-batch', { siteId, id: batch.id, watch: true }, { startAfter });
    const fileIds = files.sort((a, b) => a.ordinal - b.ordinal).map((file) => file.id);
    return { batchId: batch.id, mailWanted: batch.mailWanted, fileIds };
  },
});
