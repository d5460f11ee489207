'use client';

import {
  type ClipboardEvent,
  type FocusEvent,
  type KeyboardEvent,
  type MouseEvent,
  type RefObject,
  useCallback,
  useRef,
  useState,
} from 'react';
import type { GridBodyProps } from './body-props';
import type { LeaveEditor } from './cell-editor';
import { labelOf } from './cell-value';
import { acceptable, type CellView } from './cell-view';
import { formatTsv, parseTsv } from './delimited';
import { commandFor, type GridCommand } from './key-map';
import { moveFrom, nextEditable } from './navigate';
import { type PlannedValue, planPaste } from './paste-plan';
import { type GridPoint, heightOf, pointsOf, widthOf } from './rectangle';
import { useLatest } from './use-latest';

export interface EditingCell {
  readonly rowId: string;
  readonly columnId: string;
  readonly replaceWith: string | null;
  readonly seen: { readonly before: string; readonly version: number | null };
}

type Input = GridBodyProps & {
  readonly views: readonly (readonly CellView[])[];
  readonly element: RefObject<HTMLTableElement | null>;
  /** True while the grid itself puts the focus on the active cell. */
  readonly ownFocus: RefObject<boolean>;
  /** True while a pointer chooses the cell: it is in sight, and the page must not move under a second click. */
  readonly pointing: RefObject<boolean>;
};

const LOCKED = 'This cell is locked.';

/** Wires keys, pointer and clipboard of the table to the pure rules. */
export function useGridKeys(input: Input) {
  const latest = useLatest(input);
  const [editing, setEditing] = useState<EditingCell | null>(null);
  const editingRef = useLatest(editing);
  const pressedOnActive = useRef(false);

  const viewAt = useCallback((point: GridPoint) => latest.current.views[point.row]?.[point.column], [latest]);
  const editable = useCallback((point: GridPoint) => viewAt(point)?.editable ?? false, [viewAt]);

  const writeAt = useCallback(
    (name: string, values: readonly PlannedValue[]): number => {
      const wanted = values.flatMap((one) => {
        const view = viewAt(one);
        return view ? [{ rowId: view.rowId, columnId: view.column.id, value: one.value }] : [];
      });
      return latest.current.edits.write(name, wanted);
    },
    [latest, viewAt],
  );

  const startEditing = useCallback(
    (replaceWith: string | null) => {
      const { cursor, rows, say, element } = latest.current;
      const view = viewAt(cursor.active);
      const row = rows[cursor.active.row];
      if (!view || !row) return;
      if (view.state.kind === 'conflict') {
        const at = `[data-cell="${cursor.active.row}:${cursor.active.column}"] button`;
        element.current?.querySelector<HTMLElement>(at)?.focus();
        return;
      }
      if (!view.editable) return say(LOCKED);
      const seen = { before: view.value, version: row.version ?? null };
      setEditing({ rowId: view.rowId, columnId: view.column.id, replaceWith, seen });
    },
    [latest, viewAt],
  );

  const commit = useCallback(
    (value: string, leave: LeaveEditor, event: KeyboardEvent | null) => {
      const cell = editingRef.current;
      const { cursor, edits } = latest.current;
      setEditing(null);
      if (!cell) return;
      edits.write('edit', [{ rowId: cell.rowId, columnId: cell.columnId, value, seen: cell.seen }]);
      if (leave === 'blur') return;
      const step = leave === 'next' ? 1 : -1;
      if (leave === 'next' || leave === 'previous') {
        const target = nextEditable(cursor.active, step, cursor.size, editable);
        if (target) {
          event?.preventDefault();
          cursor.moveTo(target);
          return;
        }
        // The last editable cell: the key goes on from the cell itself and leaves the grid.
        const at = `[data-cell="${cursor.active.row}:${cursor.active.column}"]`;
        latest.current.element.current?.querySelector<HTMLElement>(at)?.focus();
        return;
      }
      event?.preventDefault();
      cursor.moveTo(leave === 'down' ? moveFrom(cursor.active, 'down', cursor.size, 1) : cursor.active);
    },
    [editable, editingRef, latest],
  );

  const cancel = useCallback(() => {
    setEditing(null);
    latest.current.cursor.refocus();
  }, [latest]);

  const clearCells = useCallback(() => {
    const { cursor, say } = latest.current;
    const points = pointsOf(cursor.selection);
    const count = writeAt(
      'clearing',
      points.filter(editable).map((point) => ({ ...point, value: '' })),
    );
    say(count > 0 ? `${count} cleared.` : points.some(editable) ? 'Nothing to clear.' : LOCKED);
  }, [editable, latest, writeAt]);

  const acceptDoubt = useCallback(() => {
    const { cursor, onAcceptDoubt } = latest.current;
    const view = viewAt(cursor.active);
    if (view && acceptable(view)) onAcceptDoubt?.({ rowId: view.rowId, columnId: view.column.id });
  }, [latest, viewAt]);

  const run = useCallback(
    (command: GridCommand) => {
      const { cursor, edits, element } = latest.current;
      switch (command.kind) {
        case 'move':
          return cursor.moveTo(
            moveFrom(cursor.active, command.to, cursor.size, pageRows(element.current)),
            command.extend,
          );
        case 'edit':
          return startEditing(command.replaceWith);
        case 'clear-selection':
          return cursor.moveTo(cursor.active);
        case 'select':
          return cursor.selectWhole(command.what);
        case 'clear-cells':
          return clearCells();
        case 'undo':
          return edits.undo();
        case 'redo':
          return edits.redo();
        case 'fill-down':
          return latest.current.onFillDown();
        case 'accept-doubt':
          return acceptDoubt();
        case 'commit':
        case 'cancel':
          return;
      }
    },
    [acceptDoubt, clearCells, latest, startEditing],
  );

  const onKeyDown = (event: KeyboardEvent<HTMLTableElement>) => {
    if (event.defaultPrevented || event.nativeEvent.isComposing) return;
    if (event.target instanceof HTMLButtonElement) return conflictKeys(event, latest.current.cursor.refocus);
    const command = commandFor(event, 'moving');
    if (!command) return;
    event.preventDefault();
    run(command);
  };

  const onMouseDown = (event: MouseEvent<HTMLTableElement>) => {
    const point = pointOfEvent(event.target);
    if (!point || isField(event.target) || event.button !== 0) return;
    const { active, moveTo } = latest.current.cursor;
    pressedOnActive.current = active.row === point.row && active.column === point.column;
    latest.current.pointing.current = true;
    moveTo(point, event.shiftKey);
  };
  const onMouseOver = (event: MouseEvent<HTMLTableElement>) => {
    const point = pointOfEvent(event.target);
    if (event.buttons !== 1 || !point || editingRef.current) return;
    const { active, moveTo } = latest.current.cursor;
    if (active.row === point.row && active.column === point.column) return;
    latest.current.pointing.current = true;
    moveTo(point, true);
  };
  const onClick = (event: MouseEvent<HTMLTableElement>) => {
    const touched = 'pointerType' in event.nativeEvent && event.nativeEvent.pointerType === 'touch';
    if (touched && pressedOnActive.current && pointOfEvent(event.target) && !isField(event.target)) startEditing(null);
  };
  const onDoubleClick = (event: MouseEvent<HTMLTableElement>) => {
    if (pointOfEvent(event.target) && !isField(event.target)) startEditing(null);
  };
  const onFocus = (event: FocusEvent<HTMLTableElement>) => {
    const point = pointOfEvent(event.target);
    const view = point && viewAt(point);
    if (!point || !view) return;
    if (!latest.current.ownFocus.current) latest.current.cursor.follow(point);
    latest.current.onFocusCell(view.rowId, view.column.id);
  };

  const copy = (event: ClipboardEvent<HTMLTableElement>): boolean => {
    if (isField(event.target)) return false;
    const { cursor, say } = latest.current;
    const { selection } = cursor;
    const lines: string[][] = [];
    for (let row = selection.top; row <= selection.bottom; row += 1) {
      const line: string[] = [];
      for (let column = selection.left; column <= selection.right; column += 1) {
        const view = viewAt({ row, column });
        line.push(view ? labelOf(view.column, view.value) : '');
      }
      lines.push(line);
    }
    event.clipboardData.setData('text/plain', formatTsv(lines));
    event.preventDefault();
    say(`${heightOf(selection) * widthOf(selection)} copied.`);
    return true;
  };
  const onPaste = (event: ClipboardEvent<HTMLTableElement>) => {
    if (isField(event.target)) return;
    event.preventDefault();
    const { cursor, say } = latest.current;
    const clipboard = parseTsv(event.clipboardData.getData('text/plain'));
    const { selection, active, size } = cursor;
    const answer = planPaste({ clipboard, selection, active, size, editable });
    if (!answer.ok) return say(answer.reason === 'all-locked' ? LOCKED : 'The clipboard holds no text.');
    const { values, covered, clipped, locked } = answer.plan;
    const count = writeAt('paste', values);
    const rest = [
      clipped > 0 ? ` ${clipped} outside the grid were left out.` : '',
      locked > 0 ? ` ${locked} locked were left alone.` : '',
    ].join('');
    say(`${count} pasted.${rest}`);
    cursor.selectBlock(covered);
  };

  return {
    editing,
    commit,
    cancel,
    handlers: {
      onKeyDown,
      onMouseDown,
      onMouseOver,
      onClick,
      onDoubleClick,
      onFocus,
      onCopy: copy,
      onCut: (event: ClipboardEvent<HTMLTableElement>) => {
        if (copy(event)) clearCells();
      },
      onPaste,
    },
  };
}

function pointOfEvent(target: EventTarget): GridPoint | null {
  const cell = target instanceof Element ? target.closest('[data-cell]') : null;
  const [row, column] = (cell?.getAttribute('data-cell') ?? '').split(':').map(Number);
  return row === undefined || column === undefined || Number.isNaN(row) ? null : { row, column };
}

function isField(target: EventTarget): boolean {
  return target instanceof Element && target.closest('input, select, textarea, button') !== null;
}

/** Inside a cell with a choice: left and right go between the buttons, Esc goes back to the cell. */
function conflictKeys(event: KeyboardEvent<HTMLTableElement>, back: () => void): void {
  if (!(event.target instanceof HTMLButtonElement)) return;
  const buttons = [...(event.target.closest('[data-cell]')?.querySelectorAll('button') ?? [])];
  const at = buttons.indexOf(event.target);
  if (event.key === 'ArrowRight' || event.key === 'ArrowLeft') {
    event.preventDefault();
    buttons[at + (event.key === 'ArrowRight' ? 1 : -1)]?.focus();
  }
  if (event.key === 'Escape') {
    event.preventDefault();
    back();
  }
}

/** How many rows fit on the screen; ten where nothing is laid out. */
function pageRows(table: HTMLTableElement | null): number {
  const height = table?.querySelector('tbody tr')?.getBoundingClientRect().height ?? 0;
  return height > 0 ? Math.max(1, Math.floor(window.innerHeight / height) - 1) : 10;
}
