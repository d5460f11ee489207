'use client';

import { Plus } from 'lucide-react';
import { useCallback, useEffect, useRef, useState } from 'react';
import { Button } from '../actions/button';
import { cx } from '../cx';
import type { GridBodyProps } from './body-props';
import { rowHeaderOf } from './cell-value';
import { acceptable, needsAttention, viewOf } from './cell-view';
import { GridCards } from './grid-cards';
import { GridTable } from './grid-table';
import { GridToolbar, SavedLine } from './grid-toolbar';
import { nextDoubtful } from './navigate';
import { planFillDown } from './paste-plan';
import { type GridPoint, heightOf } from './rectangle';
import type { GridCounts, GridProps } from './types';
import { useGridCursor } from './use-grid-cursor';
import { useGridEdits } from './use-grid-edits';
import { useLatest } from './use-latest';
import { useNarrow } from './use-narrow';

/** The editable grid of a review: a table with spreadsheet keys, or cards on a narrow screen. */
export function Grid(props: GridProps) {
  const { columns, rows, readOnly = false, onAcceptDoubt, onRemoveRows } = props;
  const narrow = useNarrow();
  const [said, setSaid] = useState({ text: '', turn: 0 });
  const say = useCallback((text: string) => setSaid((now) => ({ text, turn: now.turn + 1 })), []);
  const edits = useGridEdits({ ...props, say });
  const cursor = useGridCursor(props);
  const header = rowHeaderOf(columns);
  const latest = useLatest(props);

  const viewAt = (point: GridPoint) => {
    const row = rows[point.row];
    const column = columns[point.column];
    return row && column ? viewOf({ row, column, overlay: edits.overlay, header, readOnly }) : null;
  };
  const asks = (point: GridPoint) => {
    const view = viewAt(point);
    return view !== null && needsAttention(view);
  };
  const counts = { saving: 0, failed: 0, conflicts: 0, invalid: 0 };
  let doubtful = 0;
  for (let row = 0; row < rows.length; row += 1) {
    for (let column = 0; column < columns.length; column += 1) {
      const view = viewAt({ row, column });
      if (!view) continue;
      if (needsAttention(view)) doubtful += 1;
      if (view.state.kind === 'saving') counts.saving += 1;
      if (view.state.kind === 'error') counts.failed += 1;
      if (view.state.kind === 'conflict') counts.conflicts += 1;
      if (view.state.kind === 'invalid') counts.invalid += 1;
    }
  }

  const goToDoubtful = () => {
    const target = nextDoubtful(cursor.active, cursor.size, asks);
    if (target) cursor.moveTo(target);
    else say('No doubtful value left.');
  };
  const fillDown = () => {
    const editable = (point: GridPoint) => viewAt(point)?.editable ?? false;
    const values = planFillDown(cursor.selection, (point) => viewAt(point)?.value ?? '', editable);
    const wanted = values.flatMap((one) => {
      const cell = cursor.cellAt(one);
      return cell ? [{ ...cell, value: one.value }] : [];
    });
    const count = edits.write('fill down', wanted);
    say(count > 0 ? `${count} filled down.` : 'Nothing to fill down.');
    cursor.refocus();
  };
  const removable = rows.slice(cursor.selection.top, cursor.selection.bottom + 1).filter((row) => !row.readOnly);
  const removeRows = () => {
    edits.removeRows(removable.map((row) => row.id));
    cursor.refocus();
  };

  useCounts(counts, props.onCounts);
  useAltN(goToDoubtful);
  useLeaveGuard(counts.saving + counts.failed + counts.invalid > 0);

  const lastFocus = useRef('');
  const onFocusCell = useCallback(
    (rowId: string, columnId: string) => {
      const key = `${rowId}\u0000${columnId}`;
      if (lastFocus.current === key) return;
      lastFocus.current = key;
      latest.current.onFocusCell?.(rowId, columnId);
    },
    [latest],
  );

  const body: GridBodyProps = {
    labelledBy: props.labelledBy,
    columns,
    rows,
    readOnly,
    edits,
    cursor,
    say,
    onFocusCell,
    onAcceptDoubt: readOnly ? undefined : onAcceptDoubt,
    onFillDown: fillDown,
  };
  return (
    <div className="grid min-w-0 gap-2" data-testid="grid">
      <div
        className={cx(
          'sticky top-0 z-20 -mx-1 gap-1 border-b-2 border-gley bg-chalk px-1 py-2',
          narrow ? 'flex flex-wrap items-center justify-between' : 'grid',
        )}
      >
        <GridToolbar
          compact={narrow}
          doubtful={doubtful}
          canUndo={edits.canUndo}
          canRedo={edits.canRedo}
          readOnly={readOnly}
          selectedRows={narrow ? 1 : heightOf(cursor.selection)}
          onNextDoubtful={goToDoubtful}
          onUndo={edits.undo}
          onRedo={edits.redo}
          onFillDown={narrow ? undefined : fillDown}
          onAddRow={props.onAddRow}
          onRemoveRows={narrow || !onRemoveRows || removable.length === 0 ? undefined : removeRows}
        />
        <div className="flex flex-wrap items-start gap-x-4">
          {narrow || rows.length === 0 ? null : <CellLine body={body} />}
          {readOnly ? null : <SavedLine counts={counts} onRetry={edits.retry} />}
        </div>
      </div>
      {rows.length === 0 ? (
        <p className="border border-dashed border-fallow bg-silt p-4">
          {props.emptyText ?? 'No rows yet. Each analyte of the report will stand here as one row.'}
        </p>
      ) : narrow ? (
        <GridCards {...body} onRemoveRow={onRemoveRows ? (rowId) => edits.removeRows([rowId]) : undefined} />
      ) : (
        <GridTable {...body} />
      )}
      {narrow && props.onAddRow && !readOnly ? (
        <Button look="quiet" wide icon={<Plus aria-hidden="true" className="size-4" />} onClick={props.onAddRow}>
          Add row
        </Button>
      ) : null}
      <p role="status" aria-live="polite" className="sr-only" data-testid="grid-said">
        {said.text}
        {said.turn % 2 === 0 ? '' : '\u00a0'}
      </p>
    </div>
  );
}

/** Where the active cell comes from and why it is doubted, in one line that is always at hand. */
function CellLine({ body }: { body: GridBodyProps }) {
  const { cursor, rows, columns, edits, readOnly, onAcceptDoubt } = body;
  const row = rows[cursor.active.row];
  const column = columns[cursor.active.column];
  if (!row || !column) return null;
  const view = viewOf({ row, column, overlay: edits.overlay, header: rowHeaderOf(columns), readOnly });
  return (
    <div className="flex min-h-9 min-w-0 flex-1 basis-80 flex-wrap items-center gap-x-3 gap-y-1 text-sm">
      <span className="font-semibold">
        Row {cursor.active.row + 1}: {column.id === rowHeaderOf(columns)?.id ? view.shown : view.name}
      </span>
      {row.place ? <span className="text-clay">{row.place}</span> : null}
      {view.doubts.length > 0 ? (
        <span className={acceptable(view) ? 'text-ochre' : 'text-iron'}>
          {acceptable(view) ? 'Doubtful: ' : 'To mend: '}
          {view.doubts.map((doubt) => doubt.sentence).join(' ')}
        </span>
      ) : null}
      {acceptable(view) && onAcceptDoubt ? (
        <Button
          look="quiet"
          size="small"
          aria-keyshortcuts="Control+Enter"
          onClick={() => {
            onAcceptDoubt({ rowId: row.id, columnId: column.id });
            cursor.refocus();
          }}
        >
          It is right<span className="sr-only">, {view.name}</span>
        </Button>
      ) : null}
    </div>
  );
}

/** Alt+N works from the page view beside the grid as well. The key's place counts: with Alt some layouts type a sign. */
function useAltN(go: () => void): void {
  const latest = useLatest(go);
  useEffect(() => {
    const onKey = (event: KeyboardEvent) => {
      if (!event.altKey || event.ctrlKey || event.metaKey) return;
      if (event.code !== 'KeyN' && event.key.toLowerCase() !== 'n') return;
      event.preventDefault();
      latest.current();
    };
    window.addEventListener('keydown', onKey);
    return () => window.removeEventListener('keydown', onKey);
  }, [latest]);
}

function useCounts({ saving, failed, conflicts, invalid }: GridCounts, tell: GridProps['onCounts']): void {
  const latest = useLatest(tell);
  useEffect(
    () => latest.current?.({ saving, failed, conflicts, invalid }),
    [latest, saving, failed, conflicts, invalid],
  );
}

function useLeaveGuard(unsaved: boolean): void {
  useEffect(() => {
    if (!unsaved) return;
    const ask = (event: BeforeUnloadEvent) => event.preventDefault();
    window.addEventListener('beforeunload', ask);
    return () => window.removeEventListener('beforeunload', ask);
  }, [unsaved]);
}
