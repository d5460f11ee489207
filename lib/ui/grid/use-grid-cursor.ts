'use client';

import { useCallback, useEffect, useRef, useState } from 'react';
import { clampPoint, type GridPoint, type GridSize, type Rectangle, rectangleOf } from './rectangle';
import type { GridCellRef, GridProps } from './types';
import { useLatest } from './use-latest';

type Whole = 'all' | 'row' | 'column' | null;

interface Position {
  /** By id, so that the focus stays with its row when rows are added, removed or sorted anew. */
  readonly active: GridCellRef | null;
  readonly anchor: GridCellRef | null;
  readonly whole: Whole;
  /** Where the active cell was; used when its row is gone. */
  readonly last: GridPoint;
}

export interface GridCursor {
  readonly size: GridSize;
  readonly active: GridPoint;
  readonly selection: Rectangle;
  readonly cellAt: (point: GridPoint) => GridCellRef | null;
  /** Moves the active cell and puts the browser's focus on it. */
  readonly moveTo: (point: GridPoint, extend?: boolean) => void;
  /** The focus came by itself (Tab, pointer): only the active cell follows. */
  readonly follow: (point: GridPoint) => void;
  readonly selectWhole: (whole: Whole) => void;
  readonly selectBlock: (rectangle: Rectangle) => void;
  /** Grows by one each time the browser's focus should go to the active cell. */
  readonly focusTurn: number;
  readonly refocus: () => void;
}

type Input = Pick<GridProps, 'rows' | 'columns' | 'focusRequest'>;

const same = (a: GridCellRef | null, b: GridCellRef | null) => a?.rowId === b?.rowId && a?.columnId === b?.columnId;

export function useGridCursor(input: Input): GridCursor {
  const { rows, columns, focusRequest } = input;
  const latest = useLatest(input);
  const [position, setPosition] = useState<Position>({
    active: null,
    anchor: null,
    whole: null,
    last: { row: 0, column: 0 },
  });
  const [focusTurn, setFocusTurn] = useState(0);
  const size = { rows: rows.length, columns: columns.length };

  const pointOf = (cell: GridCellRef | null): GridPoint | null => {
    if (!cell) return null;
    const row = rows.findIndex((one) => one.id === cell.rowId);
    const column = columns.findIndex((one) => one.id === cell.columnId);
    return row < 0 || column < 0 ? null : { row, column };
  };
  const active = pointOf(position.active) ?? clampPoint(position.last, size);
  const corner = pointOf(position.anchor) ?? active;
  const block = rectangleOf(active, corner);
  const selection: Rectangle = {
    top: position.whole === 'all' || position.whole === 'column' ? 0 : block.top,
    bottom: position.whole === 'all' || position.whole === 'column' ? size.rows - 1 : block.bottom,
    left: position.whole === 'all' || position.whole === 'row' ? 0 : block.left,
    right: position.whole === 'all' || position.whole === 'row' ? size.columns - 1 : block.right,
  };

  const cellAt = useCallback(
    (point: GridPoint): GridCellRef | null => {
      const row = latest.current.rows[point.row];
      const column = latest.current.columns[point.column];
      return row && column ? { rowId: row.id, columnId: column.id } : null;
    },
    [latest],
  );
  const refocus = useCallback(() => setFocusTurn((turn) => turn + 1), []);

  const moveTo = useCallback(
    (point: GridPoint, extend = false) => {
      const cell = cellAt(point);
      setPosition((now) => ({
        active: cell,
        anchor: extend ? (now.anchor ?? now.active) : null,
        whole: null,
        last: point,
      }));
      refocus();
    },
    [cellAt, refocus],
  );
  const follow = useCallback(
    (point: GridPoint) => {
      const cell = cellAt(point);
      setPosition((now) => (same(now.active, cell) ? now : { active: cell, anchor: null, whole: null, last: point }));
    },
    [cellAt],
  );
  const selectWhole = useCallback(
    (whole: Whole) => setPosition((now) => ({ ...now, whole, anchor: whole ? now.anchor : null })),
    [],
  );
  const selectBlock = useCallback(
    (rectangle: Rectangle) => {
      const point = { row: rectangle.top, column: rectangle.left };
      setPosition({
        active: cellAt(point),
        anchor: cellAt({ row: rectangle.bottom, column: rectangle.right }),
        whole: null,
        last: point,
      });
      refocus();
    },
    [cellAt, refocus],
  );

  // The row asked for may arrive after the request (a row just added): the request stays open until it is met.
  const metKey = useRef<number | string | null>(null);
  useEffect(() => {
    if (!focusRequest || metKey.current === focusRequest.key) return;
    const row = rows.findIndex((one) => one.id === focusRequest.rowId);
    const wanted = columns.findIndex((one) => one.id === focusRequest.columnId);
    const fallback = columns.findIndex((one) => one.kind !== 'readonly' && !one.rowHeader);
    if (row < 0) return;
    metKey.current = focusRequest.key;
    moveTo({ row, column: wanted >= 0 ? wanted : Math.max(0, fallback) });
  }, [focusRequest, rows, columns, moveTo]);

  return { size, active, selection, cellAt, moveTo, follow, selectWhole, selectBlock, focusTurn, refocus };
}
