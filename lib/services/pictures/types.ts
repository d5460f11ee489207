/** A picture in shades of grey, row by row; 0 is black. */
export type Grey = { readonly width: number; readonly height: number; readonly data: Uint8Array };

/** 1 where there is ink. */
export type Ink = { readonly width: number; readonly height: number; readonly data: Uint8Array };

export type Point = { readonly x: number; readonly y: number };

/** Corners in the order top left, top right, bottom right, bottom left. */
export type Quad = readonly [Point, Point, Point, Point];

/** A connected piece of ink. */
export type Piece = {
  readonly x0: number;
  readonly y0: number;
  readonly x1: number;
  readonly y1: number;
  readonly area: number;
};
