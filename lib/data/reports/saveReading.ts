import { and, eq, sql } from 'drizzle-orm';
import { z } from 'zod';
import { report } from '@/db/schema';
import { asSiteId } from '@/lib/domain/ids';
import { READER_VERSION, type Reading } from '@/lib/reading/types';
import { audit } from '../audit';
import { findOrMakeLaboratory } from '../laboratories/findOrMakeLaboratory';
import { recallLayout } from '../learning/recallLayout';
import { enqueue, withSite } from '../transaction';
import { workerVerb } from '../verb';
import { held, leaseSchema } from './lease';
import { outcomeOf } from './readingOutcome';
import { writeReadingRows } from './writeReadingRows';

/** All of a reading or none of it, and only for the worker that still holds the report. False: somebody else has it now. */
export const saveReading = workerVerb({
  input: z.strictObject({ lease: leaseSchema, reading: z.custom<Reading>((value) => typeof value === 'object') }),
  run: ({ ctx, input: { lease, reading } }): Promise<boolean> => {
    const siteId = asSiteId(lease.siteId);
    const outcome = outcomeOf(reading);
    return withSite(siteId, async (tx) => {
      const [row] = await tx
        .update(report)
        .set({
          state: outcome.state,
          pages: reading.pages,
          pagesRead: reading.pages,
          readerVersion: READER_VERSION,
          refusalCode: outcome.refusal?.code ?? null,
          refusalSentence: outcome.refusal?.sentence ?? null,
          warnings: reading.warnings.map(({ code, sentence }) => ({ code, sentence })),
          laboratoryPrinted: reading.lab.name,
          version: sql`${report.version} + 1`,
        })
        .where(held(lease))
        .returning();
      if (!row) return false;
      if (outcome.state === 'in-review') {
        const laboratoryId = reading.lab.name ? await findOrMakeLaboratory(tx, siteId, reading.lab.name) : null;
        if (laboratoryId) {
          await tx
            .update(report)
            .set({ laboratoryId })
            .where(and(eq(report.siteId, siteId), eq(report.id, row.id)));
        }
        const recalled = await recallLayout(tx, siteId, reading);
        await tx
          .update(report)
          .set({ layoutFingerprint: recalled.fingerprint })
          .where(and(eq(report.siteId, siteId), eq(report.id, row.id)));
        await writeReadingRows(tx, ctx, siteId, row, recalled.reading);
      }
      const detail = { state: outcome.state, samples: reading.samples.length, refusal: outcome.refusal?.code ?? null };
      await audit(tx, ctx, siteId, { act: 'report.read', objectKind: 'report', objectId: row.id, detail });
      await enqueue(tx, 'tell-report', { siteId, id: row.id });
      return true;
    });
  },
});
