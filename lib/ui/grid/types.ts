/** Every cell value is text as typed or printed; the caller turns it into a number. */
export type GridColumnKind = 'text' | 'number' | 'select' | 'readonly';

export interface GridOption {
  readonly value: string;
  readonly label: string;
}

export interface GridColumn {
  readonly id: string;
  readonly header: string;
  readonly kind: GridColumnKind;
  /** Only for `select`. */
  readonly options?: readonly GridOption[];
  /** Tailwind width class, for instance `w-28`. */
  readonly widthClass?: string;
  /** The column that names the row (the analyte); the first column when none says so. */
  readonly rowHeader?: boolean;
  /** A sentence when the value cannot be saved; it stays on screen and is not sent. */
  readonly validate?: (value: string) => string | null;
}

export interface GridDoubt {
  readonly code: string;
  readonly sentence: string;
  /** No soil can show this: it cannot be waved through, only mended. */
  readonly mustMend?: boolean;
}

export type GridCellState =
  | { readonly kind: 'saved' }
  | { readonly kind: 'saving' }
  | {
      readonly kind: 'conflict';
      readonly mine: string;
      readonly theirs: string;
      readonly theirsBy?: string;
      /** The row's version that holds their value; sent back with "keep mine". */
      readonly version?: number;
    }
  | { readonly kind: 'error'; readonly sentence: string }
  /** Refused for what it says; sending it again would not help. */
  | { readonly kind: 'invalid'; readonly sentence: string };

/** How many cells are not settled; what leaves the page open until they are. */
export interface GridCounts {
  readonly saving: number;
  readonly failed: number;
  readonly conflicts: number;
  readonly invalid: number;
}

export interface GridRow {
  readonly id: string;
  /** Tells rows of one name apart (the sample); shown beside the name and said with it. */
  readonly subtitle?: string;
  /** Choices of this row alone, by column id, in place of the column's. */
  readonly options?: Readonly<Record<string, readonly GridOption[]>>;
  /** Cell text by column id; a missing entry is an empty cell. */
  readonly cells: Readonly<Record<string, string>>;
  readonly doubts?: Readonly<Record<string, readonly GridDoubt[]>>;
  /** A quiet word below a cell, by column id: where its value comes from when not from the page. */
  readonly notes?: Readonly<Record<string, string>>;
  readonly states?: Readonly<Record<string, GridCellState>>;
  readonly readOnly?: boolean;
  /** The row's version for concurrent edits; sent with each edit. */
  readonly version?: number;
  /** Where the value comes from: "Page 2, row 7", "CSV line 14", "entered by hand". */
  readonly place?: string;
}

export interface GridEdit {
  readonly rowId: string;
  readonly columnId: string;
  readonly value: string;
  /** What the person saw when the edit began. */
  readonly before: string;
  /** The row's version seen when the edit began, moved on by this grid's own saves. */
  readonly version: number | null;
}

export interface GridEditOutcome {
  readonly rowId: string;
  readonly columnId: string;
  readonly state: GridCellState;
  /** The row's version after the save. */
  readonly version?: number;
}

export interface GridCellRef {
  readonly rowId: string;
  readonly columnId: string;
}

/** A new `key` asks for the focus once; the same key again does nothing. */
export interface GridFocusRequest {
  readonly rowId: string;
  readonly columnId?: string;
  readonly key: number | string;
}

export interface GridProps {
  /** Id of the visible heading that names the grid. */
  readonly labelledBy: string;
  readonly columns: readonly GridColumn[];
  readonly rows: readonly GridRow[];
  /**
   * One user action = one call. Calls are sent one after the other. Cells that the answer does not name count as saved.
   * A rejected promise marks every cell of the batch as not saved; the typed text stays.
   */
  readonly onEdit: (edits: readonly GridEdit[]) => Promise<readonly GridEditOutcome[]>;
  readonly onFocusCell?: (rowId: string, columnId: string) => void;
  readonly focusRequest?: GridFocusRequest | null;
  readonly onAddRow?: () => void;
  readonly onRemoveRows?: (rowIds: readonly string[]) => void;
  /** With it, removing rows can be undone. */
  readonly onRestoreRows?: (rowIds: readonly string[]) => void;
  /** Told after "take theirs", so that a conflict that came in through `states` can be cleared. */
  readonly onTakeTheirs?: (cell: GridCellRef) => void;
  /** With it, a doubtful cell can be marked as checked: button "It is right" and Ctrl+Enter. */
  readonly onAcceptDoubt?: (cell: GridCellRef) => void;
  /** Told whenever the number of unsettled cells changes. */
  readonly onCounts?: (counts: GridCounts) => void;
  readonly readOnly?: boolean;
  /** Said when there are no rows. */
  readonly emptyText?: string;
}
