'use client';

import { memo, useId } from 'react';
import { cx } from '../cx';
import { CellEditor, type LeaveEditor } from './cell-editor';
import { CellNotes, type ConflictActions, ConflictChoice, hasNotes } from './cell-notes';
import type { CellView } from './cell-view';

export interface GridCellProps {
  readonly view: CellView;
  readonly rowIndex: number;
  readonly columnIndex: number;
  readonly isRowHeader: boolean;
  readonly tabStop: boolean;
  readonly selected: boolean;
  readonly activeRow: boolean;
  readonly editing: { readonly replaceWith: string | null } | null;
  readonly actions: ConflictActions;
  readonly onCommit: (value: string, leave: LeaveEditor, event: React.KeyboardEvent | null) => void;
  readonly onCancel: () => void;
}

export const GridCell = memo(function GridCell(props: GridCellProps) {
  const { view, rowIndex, columnIndex, isRowHeader, tabStop, selected, activeRow, editing } = props;
  const notesId = useId();
  const noted = hasNotes(view);
  const bad = view.state.kind === 'invalid' || view.state.kind === 'error' || view.state.kind === 'conflict';
  const mend = view.doubts.some((doubt) => doubt.mustMend);
  const doubtful = view.doubts.length > 0;
  const Tag = isRowHeader ? 'th' : 'td';
  return (
    <Tag
      {...(isRowHeader ? { scope: 'row' as const, role: 'rowheader' } : { role: 'gridcell' })}
      data-cell={`${rowIndex}:${columnIndex}`}
      aria-colindex={columnIndex + 1}
      tabIndex={tabStop ? 0 : -1}
      aria-label={`${view.name}: ${view.shown || 'empty'}`}
      aria-selected={selected}
      aria-readonly={!view.editable}
      aria-invalid={doubtful || bad || undefined}
      aria-describedby={noted ? notesId : undefined}
      className={cx(
        'relative h-11 border-b border-r border-fallow/50 px-2 py-1 text-left align-top font-normal',
        'scroll-mt-40 scroll-mb-24 focus-visible:z-10 focus-visible:outline-offset-[-3px] focus-visible:shadow-none',
        isRowHeader && 'border-l-4 pl-2 font-semibold',
        isRowHeader && (activeRow ? 'border-l-gley' : 'border-l-transparent'),
        cellGround(selected, bad || mend, doubtful, view.editable, activeRow),
        !view.editable && !isRowHeader && 'text-clay',
      )}
    >
      {editing ? (
        <CellEditor
          column={view.column}
          name={view.name}
          value={view.value}
          replaceWith={editing.replaceWith}
          onCommit={props.onCommit}
          onCancel={props.onCancel}
        />
      ) : (
        <span
          className={cx(
            'flex min-h-8 items-center gap-2 break-words',
            view.column.kind === 'number' ? 'justify-end font-figures' : '',
          )}
        >
          {isRowHeader ? (
            <span aria-hidden="true" className="w-5 flex-none text-right font-figures text-xs font-normal text-clay">
              {rowIndex + 1}
            </span>
          ) : null}
          {view.subtitle ? (
            <span className="min-w-0">
              {view.shown} <span className="block text-xs font-normal text-clay">{view.subtitle}</span>
            </span>
          ) : (
            view.shown
          )}
        </span>
      )}
      {noted ? <CellNotes view={view} id={notesId} toTheRight={view.column.kind === 'number'} /> : null}
      {view.state.kind === 'conflict' ? (
        <ConflictChoice view={view} conflict={view.state} actions={props.actions} inGrid />
      ) : null}
    </Tag>
  );
});

function cellGround(selected: boolean, bad: boolean, doubtful: boolean, editable: boolean, activeRow: boolean): string {
  if (selected) return 'bg-gley-wash outline-1 outline-dotted outline-gley -outline-offset-1';
  if (bad) return 'bg-iron-wash';
  if (doubtful) return 'bg-ochre-wash';
  if (!editable) return activeRow ? 'bg-silt' : 'bg-chalk';
  return 'bg-white';
}
