import type { Review, ReviewRow, RowOutcome } from '@/lib/schemas/review';
import { rowSchema } from '@/lib/schemas/review';
import type { Problem } from '@/lib/ui/api';
import type { GridEdit, GridEditOutcome } from '@/lib/ui/grid/types';
import { type CellId, cellText, isCellId } from './review-rows';

export type RowEdit = { rowId: string; version: number } & Partial<Record<CellId, string | null>>;

/** The cells of one user action, gathered by row: a row is saved whole or not at all. */
export function gatherByRow(edits: readonly GridEdit[]): RowEdit[] {
  const rows = new Map<string, RowEdit>();
  for (const edit of edits) {
    if (!isCellId(edit.columnId)) continue;
    const row = rows.get(edit.rowId) ?? { rowId: edit.rowId, version: edit.version ?? 1 };
    row[edit.columnId] = edit.columnId === 'value' || edit.value !== '' ? edit.value : null;
    rows.set(edit.rowId, row);
  }
  return [...rows.values()];
}

export type Settled =
  | { kind: 'saved'; row: ReviewRow }
  | { kind: 'stale'; row: ReviewRow }
  | { kind: 'refused'; sentence: string }
  | { kind: 'failed'; sentence: string };

export const fromOutcome = ({ outcome }: RowOutcome): Settled => {
  if (outcome.kind === 'saved') return { kind: 'saved', row: outcome.row };
  if (outcome.kind === 'stale') return { kind: 'stale', row: outcome.current };
  return { kind: 'refused', sentence: outcome.sentence };
};

/** What a refused save of one row means for its cells. */
export function fromProblem(problem: Problem): Settled {
  if (problem.reason === 'stale-version') {
    const current = rowSchema.safeParse(problem.current);
    if (current.success) return { kind: 'stale', row: current.data };
  }
  if (problem.code === 'invalid') {
    return { kind: 'refused', sentence: Object.values(problem.fields ?? {})[0] ?? problem.detail };
  }
  return { kind: 'failed', sentence: problem.detail };
}

/**
 * A stale row: somebody saved it since. Where they left this cell and what the row measures as this person saw them,
 * nothing is lost by saving again on their version; otherwise the person chooses.
 */
export function mayFollow(edits: readonly GridEdit[], seen: ReviewRow | undefined, current: ReviewRow): boolean {
  if (current.state === 'removed' || !seen || seen.analyte !== current.analyte) return false;
  return edits.every((edit) => isCellId(edit.columnId) && cellText(current, edit.columnId) === edit.before);
}

type CellOutcome = Pick<GridEditOutcome, 'state' | 'version'>;

function staleCell(edit: GridEdit, row: ReviewRow): CellOutcome {
  if (row.state === 'removed') {
    const sentence = `${row.editedBy ?? 'somebody else'} removed this row. Bring it back first.`;
    return { state: { kind: 'invalid', sentence } };
  }
  const theirs = isCellId(edit.columnId) ? cellText(row, edit.columnId) : '';
  if (theirs === edit.value) return { state: { kind: 'saved' }, version: row.version };
  const by = row.editedBy === null ? {} : { theirsBy: row.editedBy };
  return { state: { kind: 'conflict', mine: edit.value, theirs, version: row.version, ...by } };
}

function cellOutcome(edit: GridEdit, settled: Settled): CellOutcome {
  if (settled.kind === 'saved') return { state: { kind: 'saved' }, version: settled.row.version };
  if (settled.kind === 'refused') return { state: { kind: 'invalid', sentence: settled.sentence } };
  if (settled.kind === 'failed') return { state: { kind: 'error', sentence: settled.sentence } };
  return staleCell(edit, settled.row);
}

export function outcomesOf(edits: readonly GridEdit[], settled: Settled): GridEditOutcome[] {
  return edits.map((edit) => ({
    rowId: edit.rowId,
    columnId: edit.columnId,
    ...cellOutcome(edit, settled),
  }));
}

/** The review with some rows as the server now has them; an answer that was overtaken changes nothing. */
export function withRows<R extends Pick<Review, 'rows'>>(review: R, rows: readonly ReviewRow[]): R {
  const fresh = new Map(rows.map((row) => [row.id, row]));
  const known = new Set(review.rows.map((row) => row.id));
  return {
    ...review,
    rows: [
      ...review.rows.map((row) => {
        const next = fresh.get(row.id);
        return next && next.version >= row.version ? next : row;
      }),
      ...rows.filter((row) => !known.has(row.id)),
    ],
  };
}
