import { columnFor, isEditable, labelOf } from './cell-value';
import { cellKey, type Overlay, type OverlayCell } from './overlay';
import type { GridCellState, GridColumn, GridDoubt, GridRow } from './types';

/** One cell as it is to be drawn, whatever the form: table or card. */
export interface CellView {
  readonly rowId: string;
  readonly column: GridColumn;
  readonly value: string;
  readonly shown: string;
  readonly state: OverlayCell['state'];
  readonly doubts: readonly GridDoubt[];
  readonly note: string | undefined;
  readonly editable: boolean;
  readonly subtitle: string | undefined;
  /** "pH, Value": what a field or cell is called. */
  readonly name: string;
}

const SAVED: GridCellState = { kind: 'saved' };
const NO_DOUBTS: readonly GridDoubt[] = [];

export function viewOf(input: {
  readonly row: GridRow;
  readonly column: GridColumn;
  readonly overlay: Overlay;
  readonly header: GridColumn | undefined;
  readonly readOnly: boolean;
}): CellView {
  const { row, overlay, header, readOnly } = input;
  const column = columnFor(input.column, row) ?? input.column;
  const over = overlay.get(cellKey(row.id, column.id));
  const named = header ? labelOf(header, shownValue(overlay, row, header.id)) || 'row without a name' : '';
  const rowName = row.subtitle ? `${named}, ${row.subtitle}` : named;
  const value = shownValue(overlay, row, column.id);
  return {
    rowId: row.id,
    column,
    value,
    shown: labelOf(column, value),
    state: over?.state ?? row.states?.[column.id] ?? SAVED,
    // A value just typed is no longer the one that was doubted.
    doubts: over ? NO_DOUBTS : (row.doubts?.[column.id] ?? NO_DOUBTS),
    note: over ? undefined : row.notes?.[column.id],
    editable: isEditable(column, row, readOnly),
    subtitle: column.id === header?.id ? row.subtitle : undefined,
    name:
      column.id !== header?.id
        ? `${rowName}, ${column.header}`
        : row.subtitle
          ? `${column.header}, ${row.subtitle}`
          : column.header,
  };
}

export function shownValue(overlay: Overlay, row: GridRow, columnId: string): string {
  return overlay.get(cellKey(row.id, columnId))?.value ?? row.cells[columnId] ?? '';
}

/** A doubt that "It is right" can end. */
export function acceptable(view: Pick<CellView, 'doubts'>): boolean {
  return view.doubts.length > 0 && !view.doubts.some((doubt) => doubt.mustMend);
}

export function needsAttention(view: Pick<CellView, 'doubts' | 'state'>): boolean {
  return view.doubts.length > 0 || ['conflict', 'error', 'invalid'].includes(view.state.kind);
}
