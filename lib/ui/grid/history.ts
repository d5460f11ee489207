/** Undo and redo: one user action is one step, however many cells it touched. */
export interface CellChange {
  readonly rowId: string;
  readonly columnId: string;
  readonly before: string;
  readonly after: string;
}

export type GridAction =
  | { readonly kind: 'cells'; readonly name: string; readonly changes: readonly CellChange[] }
  | { readonly kind: 'rows-removed'; readonly name: string; readonly rowIds: readonly string[] };

export interface GridHistory {
  readonly done: readonly GridAction[];
  readonly undone: readonly GridAction[];
}

export const EMPTY_HISTORY: GridHistory = { done: [], undone: [] };

const KEPT_STEPS = 200;

export function record(history: GridHistory, action: GridAction): GridHistory {
  return { done: [...history.done, action].slice(-KEPT_STEPS), undone: [] };
}

export interface HistoryStep {
  readonly action: GridAction;
  readonly history: GridHistory;
}

export function undoStep(history: GridHistory): HistoryStep | null {
  const action = history.done.at(-1);
  if (!action) return null;
  return { action, history: { done: history.done.slice(0, -1), undone: [...history.undone, action] } };
}

export function redoStep(history: GridHistory): HistoryStep | null {
  const action = history.undone.at(-1);
  if (!action) return null;
  return { action, history: { done: [...history.done, action], undone: history.undone.slice(0, -1) } };
}

/**
 * What a step back (or forward) writes. A cell that no longer holds what this person left there was changed by
 * somebody else meanwhile; it is left alone and counted.
 */
export function changesFor(
  changes: readonly CellChange[],
  direction: 'undo' | 'redo',
  currentValue: (rowId: string, columnId: string) => string | null,
): { readonly write: readonly CellChange[]; readonly leftAlone: number } {
  const wanted = changes.map((change) =>
    direction === 'undo' ? { ...change, before: change.after, after: change.before } : change,
  );
  const write = wanted.filter((change) => currentValue(change.rowId, change.columnId) === change.before);
  return { write, leftAlone: wanted.length - write.length };
}
