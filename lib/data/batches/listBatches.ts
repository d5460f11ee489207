import type { BatchList } from '@/lib/schemas/batches';
import { nothingSchema } from '@/lib/schemas/parts';
import { siteVerb } from '../verb';
import { isOpenBatch, loadBatches } from './loadBatches';

const NEWEST = 20;

/** The batches that are not done with, newest first. */
export const listBatches = siteVerb({
  act: 'site.read',
  input: nothingSchema,
  run: async ({ tx, siteId }): Promise<BatchList> => ({
    batches: (await loadBatches(tx, siteId, NEWEST)).filter(isOpenBatch),
  }),
});
