import { and, eq } from 'drizzle-orm';
import { uploadBatch } from '@/db/schema';
import { Problem } from '@/lib/errors';
import { batchMailInput } from '@/lib/schemas/batches';
import { siteVerb } from '../verb';
import { getBatchInSite } from './getBatchInSite';

/** Whether a letter says that all of it is read. Only whoever sent the files chooses: the letter goes to them. */
export const setBatchMail = siteVerb({
  act: 'reading.work',
  input: batchMailInput,
  run: async ({ ctx, tx, siteId, person, input, audit }): Promise<{ batchId: string; mailWanted: boolean }> => {
    const before = await getBatchInSite(tx, siteId, input.batchId);
    const [row] = await tx
      .update(uploadBatch)
      .set({ mailWanted: input.wanted, mailChosenAt: ctx.now })
      .where(and(eq(uploadBatch.siteId, siteId), eq(uploadBatch.id, before.id), eq(uploadBatch.createdBy, person.id)))
      .returning();
    if (!row) {
      const sentence = 'The letter goes to whoever sent these files, so only they can choose it.';
      throw new Problem('conflict', sentence, { reason: 'not-yours' });
    }
    const detail = { wanted: row.mailWanted };
    await audit({ act: 'batch.choose-mail', objectKind: 'batch', objectId: row.id, detail });
    return { batchId: row.id, mailWanted: row.mailWanted };
  },
});
