/** Fractions of the page as stored (crop box, /Rotate not applied), origin top left, y down. */
export type PageFractions = readonly [x0: number, y0: number, x1: number, y1: number];

export type PageViewSource =
  | { readonly kind: 'pdf'; readonly url: string }
  | { readonly kind: 'image'; readonly url: string }
  | { readonly kind: 'csv'; readonly url: string }
  /** A workbook's cells as JSON, as the reader found them. */
  | { readonly kind: 'cells'; readonly url: string }
  /** A text, or XML or JSON, shown line by line. */
  | { readonly kind: 'text'; readonly url: string }
  /** A sheet that the reader has already turned into rows. */
  | { readonly kind: 'table'; readonly rows: readonly (readonly string[])[] }
  | { readonly kind: 'unsupported'; readonly sentence: string }
  /** Typed in by hand: there is no file. */
  | { readonly kind: 'none' };

export interface PageMark {
  readonly rowId: string;
  /** "pH, sample 3": what the live line says beside page and row. */
  readonly label: string;
  /** From 1, the row's number in the grid. */
  readonly rowNumber: number;
  readonly page: number | null;
  readonly box: PageFractions | null;
  /** For CSV, sheets and texts, from 1; the sheet is the first where it is left out. In a text the column is the character. */
  readonly cell: { readonly sheet?: number; readonly row: number; readonly column: number } | null;
}

export type FetchedFile =
  | { readonly ok: true; readonly bytes: Uint8Array }
  | { readonly ok: false; readonly reason: 'store-silent' | 'not-allowed' | 'gone' };

export interface PageViewProps {
  readonly source: PageViewSource;
  /** Name of the file, for labels. */
  readonly fileName: string;
  readonly marks: readonly PageMark[];
  readonly highlightedRowId: string | null;
  readonly onPick: (rowId: string) => void;
  /** How the file's bytes are got; a plain same-origin fetch when left out. */
  readonly load?: (url: string, signal: AbortSignal) => Promise<FetchedFile>;
  /** Address for "Open the original"; left out where the role may not open it. */
  readonly originalHref?: string;
}
