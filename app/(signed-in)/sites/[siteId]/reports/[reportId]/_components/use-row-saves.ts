'use client';

import { useRef } from 'react';
import { type Review, type ReviewRow, type RowOutcome, rowOutcomesSchema, rowSchema } from '@/lib/schemas/review';
import { callApi } from '@/lib/ui/api';
import { useAnnounce } from '@/lib/ui/feedback/announce';
import type { GridEdit, GridEditOutcome } from '@/lib/ui/grid/types';
import {
  fromOutcome,
  fromProblem,
  gatherByRow,
  mayFollow,
  outcomesOf,
  type RowEdit,
  type Settled,
} from './review-edits';
import type { LiveReport } from './use-report';

type Input = { path: string; review: Review; live: LiveReport };

/** Writes rows through the API, each with the version that was on screen. */
export function useRowSaves({ path, review, live }: Input) {
  const announce = useAnnounce();
  const latest = useRef(review);
  latest.current = review;

  const saveOne = async ({ rowId, ...edit }: RowEdit): Promise<Settled> => {
    const result = await callApi<unknown>(`${path}/rows/${rowId}`, { method: 'PATCH', body: edit });
    if (result.ok) return { kind: 'saved', row: rowSchema.parse(result.data) };
    // Confirmed or set aside meanwhile: the screen must say so, not only the cell.
    if (result.problem.reason?.startsWith('report-')) void live.refresh();
    return fromProblem(result.problem);
  };
  const saveMany = async (edits: readonly RowEdit[]): Promise<Map<string, Settled>> => {
    const result = await callApi<unknown>(`${path}/rows`, { method: 'PATCH', body: { edits } });
    if (!result.ok) {
      if (result.problem.reason?.startsWith('report-')) void live.refresh();
      const settled = fromProblem(result.problem);
      return new Map(edits.map((edit) => [edit.rowId, settled]));
    }
    const outcomes: RowOutcome[] = rowOutcomesSchema.parse(result.data).outcomes;
    return new Map(outcomes.map((one) => [one.rowId, fromOutcome(one)]));
  };

  const onEdit = async (edits: readonly GridEdit[]): Promise<readonly GridEditOutcome[]> => {
    const byRow = gatherByRow(edits);
    const [only] = byRow;
    const settled = byRow.length === 1 && only ? new Map([[only.rowId, await saveOne(only)]]) : await saveMany(byRow);
    const rows: ReviewRow[] = [];
    const outcomes: GridEditOutcome[] = [];
    for (const edit of byRow) {
      const mine = edits.filter((one) => one.rowId === edit.rowId);
      const seen = latest.current.rows.find((row) => row.id === edit.rowId);
      let answer: Settled = settled.get(edit.rowId) ?? {
        kind: 'failed',
        sentence: 'the text is kept here; try again.',
      };
      if (answer.kind === 'stale' && mayFollow(mine, seen, answer.row)) {
        answer = await saveOne({ ...edit, version: answer.row.version });
      }
      if (answer.kind === 'saved' || answer.kind === 'stale') rows.push(answer.row);
      outcomes.push(...outcomesOf(mine, answer));
    }
    if (rows.length > 0) live.showRows(rows);
    return outcomes;
  };

  /** Accept, remove, restore: one row, one step. */
  const step = async (rowId: string, what: 'accept' | 'remove' | 'restore'): Promise<boolean> => {
    const row = latest.current.rows.find((one) => one.id === rowId);
    if (!row) return false;
    const result = await callApi<unknown>(`${path}/rows/${rowId}/${what}`, {
      method: 'POST',
      body: { version: row.version },
    });
    if (result.ok) {
      live.showRows([rowSchema.parse(result.data)]);
      return true;
    }
    announce(result.problem.detail, { tone: 'error' });
    await live.refresh();
    return false;
  };
  const stepAll = async (rowIds: readonly string[], what: 'remove' | 'restore') => {
    for (const rowId of rowIds) await step(rowId, what);
  };

  const add = async (reportSampleId: string, analyte: string | null = null): Promise<string | null> => {
    const result = await callApi<unknown>(`${path}/rows`, { method: 'POST', body: { reportSampleId, analyte } });
    if (!result.ok) {
      announce(result.problem.detail, { tone: 'error' });
      await live.refresh();
      return null;
    }
    const row = rowSchema.parse(result.data);
    live.showRows([row]);
    return row.id;
  };

  return { onEdit, step, stepAll, add };
}
