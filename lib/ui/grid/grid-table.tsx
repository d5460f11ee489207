'use client';

import { createColumnHelper, tableFeatures, useTable } from '@tanstack/react-table';
import { useCallback, useLayoutEffect, useMemo, useRef } from 'react';
import { cx } from '../cx';
import type { GridBodyProps } from './body-props';
import { rowHeaderOf } from './cell-value';
import { type CellView, viewOf } from './cell-view';
import { GridCell } from './grid-cell';
import { contains, isSingle } from './rectangle';
import type { GridRow } from './types';
import { useGridKeys } from './use-grid-keys';

const features = tableFeatures({});
const helper = createColumnHelper<typeof features, GridRow>();
const rowIdOf = (row: GridRow) => row.id;

/** The table form: one tab stop, arrows move, one cell at a time is edited in place. */
export function GridTable(props: GridBodyProps) {
  const { labelledBy, columns, rows, readOnly, edits, cursor } = props;
  const element = useRef<HTMLTableElement>(null);
  const header = rowHeaderOf(columns);
  const defs = useMemo(
    () =>
      helper.columns(
        columns.map((column) =>
          helper.accessor((row) => row.cells[column.id] ?? '', { id: column.id, header: column.header }),
        ),
      ),
    [columns],
  );
  const table = useTable({ features, columns: defs, data: rows, getRowId: rowIdOf });
  const views = useMemo(
    () => rows.map((row) => columns.map((column) => viewOf({ row, column, overlay: edits.overlay, header, readOnly }))),
    [rows, columns, edits.overlay, header, readOnly],
  );
  const ownFocus = useRef(false);
  const pointing = useRef(false);
  const keys = useGridKeys({ ...props, views, element, ownFocus, pointing });
  const { editing } = keys;

  const { focusTurn, active } = cursor;
  const activeKey = useRef('');
  activeKey.current = `${active.row}:${active.column}`;
  useLayoutEffect(() => {
    if (focusTurn === 0) return;
    // The cursor is already there; while a selection is pulled it may even be further by now.
    ownFocus.current = true;
    element.current
      ?.querySelector<HTMLElement>(`[data-cell="${activeKey.current}"]`)
      ?.focus({ preventScroll: pointing.current });
    ownFocus.current = false;
    pointing.current = false;
  }, [focusTurn]);

  const { keepMine, takeTheirs } = edits;
  const { refocus } = cursor;
  const actions = useMemo(
    () => ({
      keepMine: (...args: Parameters<typeof keepMine>) => {
        keepMine(...args);
        refocus();
      },
      takeTheirs: (...args: Parameters<typeof takeTheirs>) => {
        takeTheirs(...args);
        refocus();
      },
    }),
    [keepMine, takeTheirs, refocus],
  );

  const isSelected = useCallback(
    (row: number, column: number) => !isSingle(cursor.selection) && contains(cursor.selection, { row, column }),
    [cursor.selection],
  );

  return (
    <div className="overflow-x-auto border border-fallow">
      <table
        ref={element}
        // biome-ignore lint/a11y/noNoninteractiveElementToInteractiveRole: the table keeps its structure, the role adds the keys
        role="grid"
        aria-labelledby={labelledBy}
        aria-multiselectable="true"
        aria-readonly={readOnly}
        aria-rowcount={rows.length + 1}
        aria-colcount={columns.length}
        className="w-full select-none border-separate border-spacing-0 text-sm"
        {...keys.handlers}
      >
        <thead>
          {table.getHeaderGroups().map((group) => (
            <tr key={group.id} aria-rowindex={1}>
              {group.headers.map((one, index) => (
                <th
                  key={one.id}
                  scope="col"
                  aria-colindex={index + 1}
                  className={cx(
                    'border-b-2 border-r border-b-gley border-r-fallow/50 bg-silt px-2 py-2 text-left text-xs font-semibold text-humus',
                    columns[index]?.kind === 'number' && 'text-right',
                    columns[index]?.widthClass,
                  )}
                >
                  <table.FlexRender header={one} />
                </th>
              ))}
            </tr>
          ))}
        </thead>
        <tbody>
          {table.getRowModel().rows.map((row, rowIndex) => (
            <tr key={row.id} aria-rowindex={rowIndex + 2}>
              {row.getAllCells().map((cell, columnIndex) => {
                const view: CellView | undefined = views[rowIndex]?.[columnIndex];
                if (!view) return null;
                const here = active.row === rowIndex && active.column === columnIndex;
                return (
                  <GridCell
                    key={cell.id}
                    view={view}
                    rowIndex={rowIndex}
                    columnIndex={columnIndex}
                    isRowHeader={view.column.id === header?.id}
                    tabStop={here}
                    selected={isSelected(rowIndex, columnIndex)}
                    activeRow={active.row === rowIndex}
                    editing={editing?.rowId === view.rowId && editing.columnId === view.column.id ? editing : null}
                    actions={actions}
                    onCommit={keys.commit}
                    onCancel={keys.cancel}
                  />
                );
              })}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
