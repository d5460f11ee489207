import { and, asc, eq, inArray } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { readingRow } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import { notFound } from '@/lib/errors';
import { editRowsInput, type RowOutcome } from '@/lib/schemas/review';
import { namesOf } from '../people/names';
import { siteVerb } from '../verb';
import { applyEdit, type CellEdits, editColumns } from './applyEdit';
import { reportInReview } from './reportInReview';
import { type RowColumns, toReviewRow } from './reviewRow';
import { STALE_ROW, writeRow } from './rowStore';

type Edit = CellEdits & { rowId: string; version: number };
type Tools = { tx: Transaction; siteId: SiteId; by: string; at: Date; reportId: string; names: Map<string, string> };

async function editOne(tools: Tools, before: RowColumns, edit: Edit): Promise<RowOutcome['outcome']> {
  const { tx, siteId, reportId } = tools;
  const { rowId, version, ...edits } = edit;
  if (before.version !== version)
    return { kind: 'stale', sentence: STALE_ROW, current: toReviewRow(before, tools.names) };
  if (before.state === 'removed') return { kind: 'refused', sentence: 'This row was removed. Bring it back first.' };
  const edited = applyEdit(before, edits, before.original);
  if (!edited.ok) return { kind: 'refused', sentence: edited.sentence };
  const columns = editColumns(before, edited, tools.by, tools.at);
  const row = await writeRow(tx, siteId, { reportId, rowId, version }, columns);
  if (!row) throw new Error('A row that was held changed all the same.');
  return { kind: 'saved', row: toReviewRow(row, tools.names) };
}

/** A paste. The rows are held in one order first, so that two pastes wait for each other; then each stands or falls alone. */
export const editRows = siteVerb({
  act: 'reading.work',
  input: editRowsInput,
  run: async ({ ctx, tx, siteId, person, input, audit }): Promise<{ outcomes: RowOutcome[] }> => {
    const { reportId, edits } = input;
    await reportInReview(tx, siteId, reportId);
    const ids = [...new Set(edits.map((edit) => edit.rowId))];
    const rows = await tx
      .select()
      .from(readingRow)
      .where(and(eq(readingRow.siteId, siteId), eq(readingRow.reportId, reportId), inArray(readingRow.id, ids)))
      .orderBy(asc(readingRow.id))
      .for('update');
    if (rows.length !== ids.length) throw notFound();
    const byId = new Map(rows.map((row) => [row.id, row]));
    const people = rows.flatMap((row) => (row.editedBy === null ? [] : [row.editedBy]));
    const names = await namesOf(tx, [person.id, ...people]);
    const tools = { tx, siteId, by: person.id, at: ctx.now, reportId, names };
    const outcomes: RowOutcome[] = [];
    const done = new Set<string>();
    for (const edit of edits) {
      const before = byId.get(edit.rowId);
      if (!before) throw notFound();
      const outcome: RowOutcome['outcome'] = done.has(edit.rowId)
        ? { kind: 'refused', sentence: 'This row stands in the paste twice; the first was taken.' }
        : await editOne(tools, before, edit);
      done.add(edit.rowId);
      outcomes.push({ rowId: edit.rowId, outcome });
    }
    const saved = outcomes.filter((one) => one.outcome.kind === 'saved').map((one) => one.rowId);
    if (saved.length > 0) {
      await audit({ act: 'row.paste', objectKind: 'report', objectId: reportId, detail: { rows: saved } });
    }
    return { outcomes };
  },
});
