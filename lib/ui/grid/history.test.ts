import { describe, expect, it } from 'vitest';
import { type CellChange, changesFor, EMPTY_HISTORY, type GridAction, record, redoStep, undoStep } from './history';

const change = (rowId: string, before: string, after: string): CellChange => ({
  rowId,
  columnId: 'value',
  before,
  after,
});
const paste: GridAction = { kind: 'cells', name: 'paste', changes: [change('a', '1', '9'), change('b', '2', '9')] };
const typed: GridAction = { kind: 'cells', name: 'edit', changes: [change('a', '9', '8')] };

describe('history', () => {
  it('takes back one user action a step, the newest first', () => {
    const history = record(record(EMPTY_HISTORY, paste), typed);
    const first = undoStep(history);
    expect(first?.action).toBe(typed);
    const second = first && undoStep(first.history);
    expect(second?.action).toBe(paste);
    expect(second && undoStep(second.history)).toBeNull();
  });

  it('brings an undone action back and forgets it after a new one', () => {
    const undone = undoStep(record(EMPTY_HISTORY, paste));
    expect(undone && redoStep(undone.history)?.action).toBe(paste);
    expect(undone && redoStep(record(undone.history, typed))).toBeNull();
  });
});

describe('changesFor', () => {
  it('turns before and after round for undo', () => {
    const answer = changesFor(paste.kind === 'cells' ? paste.changes : [], 'undo', () => '9');
    expect(answer).toEqual({ write: [change('a', '9', '1'), change('b', '9', '2')], leftAlone: 0 });
  });

  it('leaves a cell alone that somebody else has changed since', () => {
    const answer = changesFor([change('a', '1', '9'), change('b', '2', '9')], 'undo', (rowId) =>
      rowId === 'a' ? '7' : '9',
    );
    expect(answer).toEqual({ write: [change('b', '9', '2')], leftAlone: 1 });
  });

  it('leaves a row alone that is gone', () => {
    expect(changesFor([change('a', '1', '9')], 'undo', () => null)).toEqual({ write: [], leftAlone: 1 });
  });
});
