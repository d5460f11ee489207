import { batchInput } from '@/lib/schemas/batches';
import { siteVerb } from '../verb';
import { closeFiles, noteMoved } from './batchFiles';
import { getBatchInSite } from './getBatchInSite';

/** The files that never came are not waited for any more. Asking twice is the same as asking once. */
export const leaveOut = siteVerb({
  act: 'reading.work',
  input: batchInput,
  run: async ({ ctx, tx, siteId, input, audit }): Promise<{ leftOut: number }> => {
    const { id } = await getBatchInSite(tx, siteId, input.batchId);
    const leftOut = await closeFiles(tx, siteId, id, { state: 'left-out', refusal: null });
    if (leftOut > 0) {
      await audit({ act: 'batch.leave-out', objectKind: 'batch', objectId: id, detail: { files: leftOut } });
      await noteMoved(tx, ctx, siteId, id);
    }
    return { leftOut };
  },
});
