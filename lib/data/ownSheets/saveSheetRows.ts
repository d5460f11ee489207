import { and, eq, sql } from 'drizzle-orm';
import { z } from 'zod';
import { ownSheet, report } from '@/db/schema';
import { asSiteId } from '@/lib/domain/ids';
import { headingsFingerprint } from '@/lib/reading/memory/sheetMapping';
import { type OwnRows, proposeMapping } from '@/lib/reading/ownSheet';
import { READER_VERSION, type Remark } from '@/lib/reading/types';
import { audit } from '../audit';
import { held, leaseSchema } from '../reports/lease';
import { withSite } from '../transaction';
import { workerVerb } from '../verb';

type Rows =
  | { readonly ok: true; readonly sheets: readonly OwnRows[]; readonly remarks: readonly Remark[] }
  | { readonly ok: false; readonly error: Remark };

const NOTHING: Remark = {
  code: 'no-results',
  sentence:
    'No column of soil-test results was found in this spreadsheet. It is kept; give each column a heading such as pH or K, and send it again.',
};

/** The cells of a grower's sheet, and what its columns seem to be. False: somebody else has the report now. */
export const saveSheetRows = workerVerb({
  input: z.strictObject({ lease: leaseSchema, rows: z.custom<Rows>((value) => typeof value === 'object') }),
  run: ({ ctx, input: { lease, rows } }): Promise<boolean> => {
    const siteId = asSiteId(lease.siteId);
    const proposed = rows.ok ? proposeMapping(rows.sheets) : null;
    const refusal = rows.ok ? (proposed?.ok ? null : NOTHING) : rows.error;
    return withSite(siteId, async (tx) => {
      const [row] = await tx
        .update(report)
        .set({
          state: refusal === null ? 'in-review' : 'unreadable',
          pages: 0,
          pagesRead: 0,
          readerVersion: READER_VERSION,
          refusalCode: refusal?.code ?? null,
          refusalSentence: refusal?.sentence ?? null,
          warnings: rows.ok ? rows.remarks.map(({ code, sentence }) => ({ code, sentence })) : [],
          version: sql`${report.version} + 1`,
        })
        .where(held(lease))
        .returning();
      if (!row) return false;
      await tx.delete(ownSheet).where(and(eq(ownSheet.siteId, siteId), eq(ownSheet.reportId, row.id)));
      if (rows.ok && proposed?.ok) {
        await tx.insert(ownSheet).values({
          siteId,
          reportId: row.id,
          cells: rows.sheets.map(({ number, name, rows: lines }) => ({
            number,
            name,
            rows: lines.map((one) => [...one]),
          })),
          headerFingerprint: headingsFingerprint(proposed.mapping),
          proposal: { mapping: proposed.mapping, doubts: proposed.doubts },
        });
      }
      const detail = { state: row.state, ownSheet: true, refusal: refusal?.code ?? null };
      await audit(tx, ctx, siteId, { act: 'report.read', objectKind: 'report', objectId: row.id, detail });
      return true;
    });
  },
});
