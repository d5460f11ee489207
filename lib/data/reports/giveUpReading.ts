import { and, eq, inArray, sql } from 'drizzle-orm';
import { z } from 'zod';
import { report } from '@/db/schema';
import { asSiteId } from '@/lib/domain/ids';
import { idSchema } from '@/lib/schemas/parts';
import { audit } from '../audit';
import { noteFailedJob } from '../failedJobs/noteFailedJob';
import { enqueue, withSite } from '../transaction';
import { workerVerb } from '../verb';

/** What a reading is released with while the file store does not answer. */
export const STORE_DOWN = 'file-store';

const SENTENCE =
  'This file was tried several times and could not be read. It is kept; type its numbers in beside the page, or let it be read again later.';

/**
 * No try is left: the report says so instead of waiting for ever. A store that is down is nobody's fault and passes: such
 * a report stays received, and the sweep asks for it again every few minutes.
 */
export const giveUpReading = workerVerb({
  input: z.strictObject({ siteId: idSchema, id: idSchema }),
  run: ({ ctx, input }): Promise<void> => {
    const siteId = asSiteId(input.siteId);
    return withSite(siteId, async (tx) => {
      const [row] = await tx
        .update(report)
        .set({
          state: 'unreadable',
          refusalCode: sql`coalesce(${report.refusalCode}, 'reader-failed')`,
          refusalSentence: sql`coalesce(${report.refusalSentence}, ${SENTENCE})`,
          version: sql`${report.version} + 1`,
        })
        .where(
          and(
            eq(report.siteId, siteId),
            eq(report.id, input.id),
            inArray(report.state, ['received', 'reading']),
            sql`${report.refusalCode} is distinct from ${STORE_DOWN}`,
          ),
        )
        .returning({ id: report.id, code: report.refusalCode, sentence: report.refusalSentence });
      if (!row) return;
      await noteFailedJob(tx, ctx, siteId, {
        job: 'read-report',
        subjectId: row.id,
        code: row.code ?? 'reader-failed',
        sentence: row.sentence ?? SENTENCE,
      });
      await enqueue(tx, 'tell-report', { siteId, id: row.id });
      await audit(tx, ctx, siteId, { act: 'report.give-up', objectKind: 'report', objectId: input.id });
    });
  },
});
