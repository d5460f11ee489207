import { Problem } from '@/lib/errors';
import { refuseFileInput } from '@/lib/schemas/batches';
import { siteVerb } from '../verb';
import { closeFiles, getBatchFileInSite, noteMoved } from './batchFiles';

/** A file of the batch was not taken: the reason stays on its list. */
export const refuseFile = siteVerb({
  act: 'reading.work',
  input: refuseFileInput,
  run: async ({ ctx, tx, siteId, input, audit }): Promise<{ fileId: string; state: 'refused' }> => {
    const { batchId, fileId, sentence } = input;
    await getBatchFileInSite(tx, siteId, fileId, batchId);
    const changed = await closeFiles(tx, siteId, batchId, { state: 'refused', refusal: sentence, fileId });
    if (changed === 0) throw new Problem('conflict', 'This file has arrived after all.', { reason: 'file-arrived' });
    await audit({ act: 'batch.refuse-file', objectKind: 'batch', objectId: batchId, detail: { fileId } });
    await noteMoved(tx, ctx, siteId, batchId);
    return { fileId, state: 'refused' };
  },
});
