import { isEditable, labelOf } from './cell-value';
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
  readonly editable: boolean;
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
  const { row, column, overlay, header, readOnly } = input;
  const over = overlay.get(cellKey(row.id, column.id));
  const rowName = header ? labelOf(header, shownValue(overlay, row, header.id)) || 'row without a name' : '';
  const value = shownValue(overlay, row, column.id);
  return {
    rowId: row.id,
    column,
    value,
    shown: labelOf(column, value),
    state: over?.state ?? row.states?.[column.id] ?? SAVED,
    // A value just typed is no longer the one that was doubted.
    doubts: over ? NO_DOUBTS : (row.doubts?.[column.id] ?? NO_DOUBTS),
    editable: isEditable(column, row, readOnly),
    name: column.id === header?.id ? column.header : `${rowName}, ${column.header}`,
  };
}

export function shownValue(overlay: Overlay, row: GridRow, columnId: string): string {
  return overlay.get(cellKey(row.id, columnId))?.value ?? row.cells[columnId] ?? '';
}

export function needsAttention(view: Pick<CellView, 'doubts' | 'state'>): boolean {
  return view.doubts.length > 0 || ['conflict', 'error', 'invalid'].includes(view.state.kind);
}
