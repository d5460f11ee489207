import { and, eq, inArray } from 'drizzle-orm';
import { z } from 'zod';
import type { Transaction } from '@/db/client';
import { pageCopy } from '@/db/schema';
import { asSiteId, type SiteId } from '@/lib/domain/ids';
import { log } from '@/lib/log';
import { copyInput, type PageCopy } from '@/lib/schemas/copies';
import { idSchema } from '@/lib/schemas/parts';
import { deleteFile } from '@/lib/services/storage/storage';
import { withSite } from '../transaction';
import { workerVerb } from '../verb';
import { siteWorkVerb } from '../workVerb';
import { getCopyInReport, keysOf, toCopy } from './copyStore';

async function moveAway(tx: Transaction, siteId: SiteId, copyId: string): Promise<boolean> {
  const rows = await tx
    .update(pageCopy)
    .set({ state: 'thrown-away' })
    .where(
      and(eq(pageCopy.siteId, siteId), eq(pageCopy.id, copyId), inArray(pageCopy.state, ['asked', 'ready', 'failed'])),
    )
    .returning({ id: pageCopy.id });
  return rows.length > 0;
}

async function deleteFiles(keys: readonly string[]): Promise<void> {
  for (const key of keys) await deleteFile(key);
}

/** The copy and its files go at once. Asking twice is the same as asking once. */
export const throwAwayCopy = siteWorkVerb({
  act: 'reading.work',
  input: copyInput,
  run: async ({ siteId, input, inSite }): Promise<PageCopy> => {
    const row = await inSite(async ({ tx, audit }) => {
      const before = await getCopyInReport(tx, siteId, input.reportId, input.copyId);
      if (await moveAway(tx, siteId, before.id))
        await audit({ act: 'page-copy.throw-away', objectKind: 'report', objectId: before.reportId });
      return before;
    });
    // The row says it is gone either way, and no address of ours serves the files any more.
    await deleteFiles(keysOf(row)).catch((err: unknown) =>
      log().warn({ err }, 'a thrown-away copy stays in the store'),
    );
    return toCopy({ ...row, state: 'thrown-away' });
  },
});

/** A day later nobody waits for it any more. */
export const dropCopy = workerVerb({
  input: z.strictObject({ siteId: idSchema, id: idSchema }),
  run: async ({ input }): Promise<void> => {
    const siteId = asSiteId(input.siteId);
    const row = await withSite(siteId, async (tx) => {
      const [found] = await tx
        .select()
        .from(pageCopy)
        .where(and(eq(pageCopy.siteId, siteId), eq(pageCopy.id, input.id)));
      if (found) await moveAway(tx, siteId, found.id);
      return found;
    });
    if (row) await deleteFiles(keysOf(row));
  },
});
