import { and, eq, isNull, lt, or } from 'drizzle-orm';
import { z } from 'zod';
import { pageCopy, report } from '@/db/schema';
import { asSiteId } from '@/lib/domain/ids';
import { idSchema } from '@/lib/schemas/parts';
import { sha256 } from '@/lib/services/storage/storage';
import { enqueue, withSite } from '../transaction';
import { workerVerb } from '../verb';

/** A worker that began this long ago was killed: its job has run out as well (150 s). */
const LOST_AFTER_MS = 140_000;
const KEPT_MS = 24 * 3600 * 1000;

const jobInput = z.strictObject({ siteId: idSchema, id: idSchema });
const lease = jobInput.extend({ started: z.date() });

export type CopyTask = {
  lease: z.infer<typeof lease>;
  page: number;
  fileKey: string;
  sha256: string;
  fileName: string;
};

const held = (one: z.infer<typeof lease>) =>
  and(
    eq(pageCopy.siteId, one.siteId),
    eq(pageCopy.id, one.id),
    eq(pageCopy.state, 'asked'),
    eq(pageCopy.startedAt, one.started),
  );

/** Null: another worker makes it, or nobody waits for it any more. */
export const startCopy = workerVerb({
  input: jobInput,
  run: ({ ctx, input }): Promise<CopyTask | null> =>
    withSite(asSiteId(input.siteId), async (tx) => {
      const lost = new Date(ctx.now.getTime() - LOST_AFTER_MS);
      const [row] = await tx
        .update(pageCopy)
        .set({ startedAt: ctx.now })
        .where(
          and(
            eq(pageCopy.siteId, input.siteId),
            eq(pageCopy.id, input.id),
            eq(pageCopy.state, 'asked'),
            or(isNull(pageCopy.startedAt), lt(pageCopy.startedAt, lost)),
          ),
        )
        .returning();
      if (!row) return null;
      const [file] = await tx
        .select({ fileKey: report.fileKey, sha256: report.sha256, fileName: report.fileName })
        .from(report)
        .where(and(eq(report.siteId, input.siteId), eq(report.id, row.reportId)));
      if (!file?.fileKey || !file.sha256 || !file.fileName) return null;
      return {
        lease: { ...input, started: ctx.now },
        page: row.page,
        fileKey: file.fileKey,
        sha256: file.sha256,
        fileName: file.fileName,
      };
    }),
});

const bytes = z.custom<Uint8Array>((value) => value instanceof Uint8Array);
const stored = z.strictObject({ key: z.string(), bytes });

/** asked -> ready, only for the worker that still holds it. False: somebody else has it, or it was thrown away. */
export const saveCopy = workerVerb({
  input: z.strictObject({ lease, picture: stored, bundle: stored, wordsKept: z.number(), wordsMasked: z.number() }),
  run: ({ ctx, input }): Promise<boolean> =>
    withSite(asSiteId(input.lease.siteId), async (tx) => {
      const rows = await tx
        .update(pageCopy)
        .set({
          state: 'ready',
          readyAt: ctx.now,
          sentence: null,
          pictureKey: input.picture.key,
          pictureSha256: sha256(input.picture.bytes),
          bundleKey: input.bundle.key,
          bundleSha256: sha256(input.bundle.bytes),
          wordsKept: input.wordsKept,
          wordsMasked: input.wordsMasked,
        })
        .where(held(input.lease))
        .returning({ id: pageCopy.id });
      const { siteId, id } = input.lease;
      const startAfter = new Date(ctx.now.getTime() + KEPT_MS);
      if (rows.length > 0) await enqueue(tx, 'drop-copy', { siteId, id }, { startAfter });
      return rows.length > 0;
    }),
});

/** This try failed and the next may begin at once. */
export const releaseCopy = workerVerb({
  input: lease,
  run: ({ input }): Promise<void> =>
    withSite(asSiteId(input.siteId), async (tx) => {
      await tx.update(pageCopy).set({ startedAt: null }).where(held(input));
    }),
});

/** asked -> failed: with a sentence for whoever waits. */
export const failCopy = workerVerb({
  input: jobInput.extend({ sentence: z.string().min(1) }),
  run: ({ input }): Promise<void> =>
    withSite(asSiteId(input.siteId), async (tx) => {
      await tx
        .update(pageCopy)
        .set({ state: 'failed', sentence: input.sentence })
        .where(and(eq(pageCopy.siteId, input.siteId), eq(pageCopy.id, input.id), eq(pageCopy.state, 'asked')));
    }),
});
