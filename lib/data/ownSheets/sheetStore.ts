import { and, eq } from 'drizzle-orm';
import { z } from 'zod';
import type { Transaction } from '@/db/client';
import { ownSheet, sheetMapping } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import { notFound, Problem } from '@/lib/errors';
import { headingsFingerprint, withRemembered } from '@/lib/reading/memory/sheetMapping';
import { type OwnMapping, type OwnRows, proposeMapping } from '@/lib/reading/ownSheet';
import type { Remark } from '@/lib/reading/types';
import { type ColumnMeaningInput, mappingSchema } from '@/lib/schemas/ownSheets';
import { remarkSchema } from '@/lib/schemas/parts';

export type SheetRow = typeof ownSheet.$inferSelect;
const proposalSchema = z.object({ mapping: mappingSchema, doubts: z.array(remarkSchema) });

export async function getSheetOfReport(tx: Transaction, siteId: SiteId, reportId: string): Promise<SheetRow> {
  const [row] = await tx
    .select()
    .from(ownSheet)
    .where(and(eq(ownSheet.siteId, siteId), eq(ownSheet.reportId, reportId)));
  if (!row) throw notFound();
  return row;
}

/** What the database holds was written by us; a key that the registry has lost since makes the whole of it void. */
function asMapping(stored: unknown): OwnMapping | null {
  const parsed = mappingSchema.safeParse(stored);
  return parsed.success ? (parsed.data as OwnMapping) : null;
}

type Remembered = { mapping: OwnMapping; savedAt: Date };

async function remembered(tx: Transaction, siteId: SiteId, fingerprint: string): Promise<Remembered | null> {
  const [row] = await tx
    .select()
    .from(sheetMapping)
    .where(and(eq(sheetMapping.siteId, siteId), eq(sheetMapping.headerFingerprint, fingerprint)));
  const mapping = asMapping(row?.mapping);
  return row && mapping ? { mapping, savedAt: row.savedAt } : null;
}

export type Mapped = { mapping: OwnMapping; doubts: readonly Remark[]; rememberedAt: Date | null };

/** What is said of the sheet now: by the grower, else as the same headings were read before, else as proposed. */
export async function mappingNow(tx: Transaction, siteId: SiteId, row: SheetRow): Promise<Mapped> {
  const proposal = proposalSchema.safeParse(row.proposal);
  if (!proposal.success) throw new Error('The proposal of a sheet cannot be read.');
  const proposed = proposal.data.mapping as OwnMapping;
  const said = asMapping(row.mapping);
  const before = await remembered(tx, siteId, row.headerFingerprint);
  if (said) return { mapping: said, doubts: [], rememberedAt: null };
  if (!before) return { mapping: proposed, doubts: proposal.data.doubts, rememberedAt: null };
  return { mapping: withRemembered(proposed, before.mapping), doubts: [], rememberedAt: before.savedAt };
}

export function sheetOf(row: SheetRow, number: number): OwnRows {
  const sheet = row.cells.find((one) => one.number === number);
  if (!sheet) throw new Problem('invalid', 'This workbook has no such sheet.', { fields: { sheet: 'No such sheet.' } });
  return sheet;
}

export type Choice = {
  sheet: number;
  dateOrder: OwnMapping['dateOrder'];
  columns?: readonly { column: number; meaning: ColumnMeaningInput }[] | undefined;
};

/** The mapping that a person chose, on top of what the sheet itself says: headings and cells are never taken from them. */
export function chosen(row: SheetRow, now: OwnMapping, choice: Choice): OwnMapping {
  let base = now;
  if (choice.sheet !== now.sheet) {
    const proposed = proposeMapping([sheetOf(row, choice.sheet)]);
    if (!proposed.ok) {
      const sentence = 'No column of soil-test results was found in that sheet. Yours is unchanged.';
      throw new Problem('invalid', sentence, { fields: { sheet: sentence } });
    }
    base = proposed.mapping;
  }
  const meanings = new Map(choice.columns?.map((one) => [one.column, one.meaning]));
  const columns = base.columns.map((column) => {
    const meaning = meanings.get(column.column);
    // The schema has checked each key against the same registry that the reading room's types come from.
    return meaning === undefined ? column : { ...column, meaning: meaning as (typeof column)['meaning'] };
  });
  return { ...base, columns, dateOrder: choice.dateOrder };
}

/** Kept for the next sheet with these headings. */
export async function rememberMapping(
  tx: Transaction,
  siteId: SiteId,
  by: string,
  at: Date,
  mapping: OwnMapping,
): Promise<void> {
  const values = { mapping, savedBy: by, savedAt: at };
  await tx
    .insert(sheetMapping)
    .values({ siteId, headerFingerprint: headingsFingerprint(mapping), ...values })
    .onConflictDoUpdate({ target: [sheetMapping.siteId, sheetMapping.headerFingerprint], set: values });
}
