import type { GridColumn, GridRow } from './types';
import type { GridCursor } from './use-grid-cursor';
import type { GridEdits } from './use-grid-edits';

/** What both forms of the grid, table and cards, are given. */
export interface GridBodyProps {
  readonly labelledBy: string;
  readonly columns: readonly GridColumn[];
  readonly rows: readonly GridRow[];
  readonly readOnly: boolean;
  readonly edits: GridEdits;
  readonly cursor: GridCursor;
  readonly say: (sentence: string) => void;
  readonly onFocusCell: (rowId: string, columnId: string) => void;
  readonly onFillDown: () => void;
  readonly onAcceptDoubt?: ((cell: { rowId: string; columnId: string }) => void) | undefined;
}
