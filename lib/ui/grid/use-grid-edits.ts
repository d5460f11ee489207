'use client';

import { useCallback, useLayoutEffect, useRef, useState } from 'react';
import { columnFor, faultOf, tidyValue } from './cell-value';
import {
  type CellChange,
  changesFor,
  EMPTY_HISTORY,
  type GridAction,
  type GridHistory,
  record,
  redoStep,
  undoStep,
} from './history';
import { cellKey, type Overlay, type OverlayCell, settle, withEdits, withOutcome, without } from './overlay';
import type { GridCellRef, GridCellState, GridColumn, GridEdit, GridProps, GridRow } from './types';
import { useLatest } from './use-latest';
import { OwnVersions } from './versions';

export interface WantedValue extends GridCellRef {
  readonly value: string;
  /** What the person saw when the edit began; the present value when left out. */
  readonly seen?: { readonly before: string; readonly version: number | null };
}

export interface GridEdits {
  readonly overlay: Overlay;
  readonly valueAt: (rowId: string, columnId: string) => string;
  readonly write: (name: string, wanted: readonly WantedValue[]) => number;
  readonly undo: () => void;
  readonly redo: () => void;
  readonly canUndo: boolean;
  readonly canRedo: boolean;
  readonly removeRows: (rowIds: readonly string[]) => void;
  readonly keepMine: (cell: GridCellRef, conflict: Extract<GridCellState, { kind: 'conflict' }>) => void;
  readonly takeTheirs: (cell: GridCellRef, conflict: Extract<GridCellState, { kind: 'conflict' }>) => void;
  readonly retry: () => void;
}

const FAILED: GridCellState = { kind: 'error', sentence: 'the text is kept here; try again.' };

const plural = (count: number, one: string, many: string) => `${count} ${count === 1 ? one : many}`;

type Input = Pick<GridProps, 'rows' | 'columns' | 'onEdit' | 'onRemoveRows' | 'onRestoreRows' | 'onTakeTheirs'> & {
  readonly say: (sentence: string) => void;
};

export function useGridEdits(input: Input): GridEdits {
  const latest = useLatest(input);
  const [overlay, setOverlay] = useState<Overlay>(() => new Map());
  const [history, setHistory] = useState<GridHistory>(EMPTY_HISTORY);
  const overlayRef = useRef(overlay);
  const historyRef = useRef(history);
  const queue = useRef<Promise<void>>(Promise.resolve());
  const versions = useRef(new OwnVersions());

  const rowOf = useCallback(
    (rowId: string): GridRow | undefined => latest.current.rows.find((row) => row.id === rowId),
    [latest],
  );
  const columnOf = useCallback(
    (columnId: string): GridColumn | undefined => latest.current.columns.find((column) => column.id === columnId),
    [latest],
  );
  const valueAt = useCallback(
    (rowId: string, columnId: string) =>
      overlayRef.current.get(cellKey(rowId, columnId))?.value ?? rowOf(rowId)?.cells[columnId] ?? '',
    [rowOf],
  );
  const change = useCallback((make: (now: Overlay) => Overlay) => {
    overlayRef.current = make(overlayRef.current);
    setOverlay(overlayRef.current);
  }, []);
  const keep = useCallback((next: GridHistory) => {
    historyRef.current = next;
    setHistory(next);
  }, []);

  const { rows } = input;
  useLayoutEffect(() => {
    const byId = new Map(rows.map((row) => [row.id, row]));
    change((now) => settle(now, (rowId) => byId.get(rowId)));
  }, [rows, change]);

  const deliver = useCallback(
    async (edits: readonly GridEdit[]) => {
      const sent = edits.map((edit) => ({ ...edit, version: versions.current.follow(edit.rowId, edit.version) }));
      try {
        const outcomes = await latest.current.onEdit(sent);
        for (const edit of sent) {
          const outcome = outcomes.find((one) => one.rowId === edit.rowId && one.columnId === edit.columnId);
          if (!outcome || outcome.state.kind === 'saved')
            versions.current.saved(edit.rowId, edit.version, outcome?.version);
        }
        change((now) => settle(withOutcome(now, edits, outcomes), rowOf));
        const conflicts = outcomes.filter((one) => one.state.kind === 'conflict').length;
        const failed = outcomes.filter((one) => one.state.kind === 'error').length;
        if (conflicts > 0)
          latest.current.say(`${plural(conflicts, 'value', 'values')} changed by somebody else. Choose which to keep.`);
        const refused = outcomes.flatMap((one) => (one.state.kind === 'invalid' ? [one.state.sentence] : []));
        if (refused[0]) latest.current.say(`Not saved: ${refused[0]}`);
        if (failed > 0) latest.current.say(`${plural(failed, 'value', 'values')} not saved. The text is kept.`);
      } catch {
        const outcomes = edits.map(({ rowId, columnId }) => ({ rowId, columnId, state: FAILED }));
        change((now) => withOutcome(now, edits, outcomes));
        latest.current.say(`${plural(edits.length, 'value', 'values')} not saved. The text is kept.`);
      }
    },
    [change, latest, rowOf],
  );

  const send = useCallback(
    (edits: readonly GridEdit[]) => {
      if (edits.length === 0) return;
      change((now) => withEdits(now, edits, rowOf, { kind: 'saving' }));
      queue.current = queue.current.then(() => deliver(edits));
    },
    [change, deliver, rowOf],
  );

  /** Shows the values at once, sends those that can be saved, keeps the others on screen with their fault. */
  const put = useCallback(
    (wanted: readonly WantedValue[]): readonly CellChange[] => {
      const changes: CellChange[] = [];
      const edits: GridEdit[] = [];
      for (const { rowId, columnId, value, seen } of wanted) {
        const row = rowOf(rowId);
        const column = columnFor(columnOf(columnId), row);
        if (!column || !row) continue;
        const before = seen?.before ?? valueAt(rowId, columnId);
        const after = tidyValue(column, value);
        if (after === before) continue;
        changes.push({ rowId, columnId, before, after });
        const fault = faultOf(column, after);
        const shown = overlayRef.current.get(cellKey(rowId, columnId));
        // Text that never reached the server is no base to compare with there.
        const base = shown?.state.kind === 'invalid' || shown?.state.kind === 'error' ? shown.base : before;
        const version = seen ? seen.version : (row.version ?? null);
        const edit = { rowId, columnId, value: after, before: base, version };
        if (!fault && shown?.state.kind === 'invalid' && after === base) change((now) => without(now, rowId, columnId));
        else if (fault) change((now) => withEdits(now, [edit], rowOf, { kind: 'invalid', sentence: fault }));
        else edits.push(edit);
      }
      send(edits);
      return changes;
    },
    [change, columnOf, rowOf, send, valueAt],
  );

  const write = useCallback(
    (name: string, wanted: readonly WantedValue[]) => {
      const changes = put(wanted);
      if (changes.length > 0) keep(record(historyRef.current, { kind: 'cells', name, changes }));
      return changes.length;
    },
    [keep, put],
  );

  const replay = useCallback(
    (action: GridAction, direction: 'undo' | 'redo') => {
      const word = direction === 'undo' ? 'Undone' : 'Done again';
      if (action.kind === 'rows-removed') {
        if (direction === 'undo') latest.current.onRestoreRows?.(action.rowIds);
        else latest.current.onRemoveRows?.(action.rowIds);
        latest.current.say(`${word}: ${action.name}.`);
        return;
      }
      const current = (rowId: string, columnId: string) => (rowOf(rowId) ? valueAt(rowId, columnId) : null);
      const { write: writes, leftAlone } = changesFor(action.changes, direction, current);
      put(writes.map(({ rowId, columnId, after }) => ({ rowId, columnId, value: after })));
      const rest = leftAlone > 0 ? ` ${plural(leftAlone, 'cell', 'cells')} left alone: changed since.` : '';
      latest.current.say(`${word}: ${action.name}, ${plural(writes.length, 'cell', 'cells')}.${rest}`);
    },
    [latest, put, rowOf, valueAt],
  );

  const undo = useCallback(() => {
    const step = undoStep(historyRef.current);
    if (!step) return latest.current.say('Nothing to undo.');
    keep(step.history);
    replay(step.action, 'undo');
  }, [keep, latest, replay]);

  const redo = useCallback(() => {
    const step = redoStep(historyRef.current);
    if (!step) return latest.current.say('Nothing to redo.');
    keep(step.history);
    replay(step.action, 'redo');
  }, [keep, latest, replay]);

  const removeRows = useCallback(
    (rowIds: readonly string[]) => {
      if (rowIds.length === 0) return;
      latest.current.onRemoveRows?.(rowIds);
      const name = `removal of ${plural(rowIds.length, 'row', 'rows')}`;
      if (latest.current.onRestoreRows) keep(record(historyRef.current, { kind: 'rows-removed', name, rowIds }));
      latest.current.say(`${plural(rowIds.length, 'row', 'rows')} removed.`);
    },
    [keep, latest],
  );

  const keepMine = useCallback<GridEdits['keepMine']>(
    ({ rowId, columnId }, { mine, theirs, version }) => {
      const known = version ?? rowOf(rowId)?.version ?? null;
      send([{ rowId, columnId, value: mine, before: theirs, version: known }]);
    },
    [rowOf, send],
  );

  const takeTheirs = useCallback<GridEdits['takeTheirs']>(
    (cell, { theirs }) => {
      change((now) => {
        const shown = withEdits(now, [{ ...cell, value: theirs }], rowOf, { kind: 'saved' });
        return settle(shown, rowOf);
      });
      latest.current.onTakeTheirs?.(cell);
      latest.current.say('Their value is kept.');
    },
    [change, latest, rowOf],
  );

  const retry = useCallback(() => send(failedEdits(overlayRef.current)), [send]);

  return {
    overlay,
    valueAt,
    write,
    undo,
    redo,
    canUndo: history.done.length > 0,
    canRedo: history.undone.length > 0,
    removeRows,
    keepMine,
    takeTheirs,
    retry,
  };
}

/** From the value and version the person saw, so that somebody else's change meanwhile is still noticed. */
function failedEdits(overlay: Overlay): GridEdit[] {
  return [...overlay.entries()]
    .filter((entry): entry is [string, OverlayCell] => entry[1].state.kind === 'error')
    .map(([key, cell]) => {
      const [rowId = '', columnId = ''] = key.split('\u0000');
      return { rowId, columnId, value: cell.value, before: cell.base, version: cell.baseVersion };
    });
}
