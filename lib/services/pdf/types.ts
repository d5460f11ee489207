/**
 * A word as the file places it: fractions of the page as stored (crop box, /Rotate not applied), origin top left, y down.
 * The reader has a type of the same shape; the two rooms do not import each other.
 */
export type PdfWord = {
  readonly text: string;
  readonly x0: number;
  readonly y0: number;
  readonly x1: number;
  readonly y1: number;
  readonly size: number;
  readonly direction: 0 | 90 | 180 | 270;
};

export type PdfPage = {
  readonly number: number;
  readonly width: number;
  readonly height: number;
  readonly rotation: 0 | 90 | 180 | 270;
  readonly words: readonly PdfWord[];
};
