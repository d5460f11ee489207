import type { GridCellState, GridEdit, GridEditOutcome, GridRow } from './types';

/**
 * What this person typed, kept over the server's rows until they have caught up. New rows from the server replace
 * everything except what is still on its way, refused, in conflict or not saved.
 */
export interface OverlayCell {
  readonly value: string;
  /** The server's value and version when the edit was made: a change of either means the server has caught up. */
  readonly base: string;
  readonly baseVersion: number | null;
  readonly state: GridCellState;
}

export type Overlay = ReadonlyMap<string, OverlayCell>;

export const cellKey = (rowId: string, columnId: string): string => `${rowId}\u0000${columnId}`;

export function withEdits(
  overlay: Overlay,
  edits: readonly Pick<GridEdit, 'rowId' | 'columnId' | 'value'>[],
  rowOf: (rowId: string) => GridRow | undefined,
  state: OverlayCell['state'],
): Overlay {
  const next = new Map(overlay);
  for (const edit of edits) {
    const row = rowOf(edit.rowId);
    next.set(cellKey(edit.rowId, edit.columnId), {
      value: edit.value,
      base: row?.cells[edit.columnId] ?? '',
      baseVersion: row?.version ?? null,
      state,
    });
  }
  return next;
}

export function withOutcome(
  overlay: Overlay,
  sent: readonly GridEdit[],
  outcomes: readonly GridEditOutcome[],
): Overlay {
  const next = new Map(overlay);
  for (const edit of sent) {
    const key = cellKey(edit.rowId, edit.columnId);
    const cell = next.get(key);
    // The person has typed something newer into the cell meanwhile: that one is still on its way.
    if (!cell || cell.value !== edit.value || cell.state.kind !== 'saving') continue;
    const outcome = outcomes.find((one) => one.rowId === edit.rowId && one.columnId === edit.columnId);
    next.set(key, { ...cell, state: outcome?.state ?? { kind: 'saved' } });
  }
  return next;
}

/** Drops saved cells once the server's row shows another value or version than the one the edit started from. */
export function settle(overlay: Overlay, rowOf: (rowId: string) => GridRow | undefined): Overlay {
  let changed = false;
  const next = new Map(overlay);
  for (const [key, cell] of overlay) {
    const [rowId = '', columnId = ''] = key.split('\u0000');
    const row = rowOf(rowId);
    const server = row?.cells[columnId] ?? '';
    const caughtUp = server !== cell.base || server === cell.value || (row?.version ?? null) !== cell.baseVersion;
    if (row === undefined || (cell.state.kind === 'saved' && caughtUp)) {
      next.delete(key);
      changed = true;
    }
  }
  return changed ? next : overlay;
}

export function without(overlay: Overlay, rowId: string, columnId: string): Overlay {
  const next = new Map(overlay);
  next.delete(cellKey(rowId, columnId));
  return next;
}
