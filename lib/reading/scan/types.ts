import type { Box } from '../types';

/** A word as the engine saw it on a level page; box in points of the picture, certainty 0 to 1. */
export type Seen = {
  readonly text: string;
  readonly x0: number;
  readonly y0: number;
  readonly x1: number;
  readonly y1: number;
  readonly certainty: number;
};

/** A connected piece of ink. */
export type Ink = { readonly x0: number; readonly y0: number; readonly x1: number; readonly y1: number };

/** A page read from its picture: upright and level, in points of that picture. */
export type ScannedPage = {
  readonly number: number;
  readonly width: number;
  readonly height: number;
  /** Usual height of a letter, in points of the picture. */
  readonly letter: number;
  /** Points of the picture to one point of paper (72 an inch). */
  readonly scale: number;
  /** The words as each way of looking at the page saw them. */
  readonly views: readonly (readonly Seen[])[];
  /** Connected pieces of ink: letters, figures, points. */
  readonly pieces: readonly Ink[];
  /** A box on the level picture as fractions of the page as stored. */
  readonly stored: (box: { x0: number; y0: number; x1: number; y1: number }) => Box;
};

/** A word after the views were put together. */
export type Merged = Seen & {
  /** How many views saw exactly this. */
  readonly support: number;
  /** What other views saw in its place. */
  readonly others: readonly string[];
  /** Views that looked at the page at all. */
  readonly of: number;
  /** What the ink itself says of the number's point: put in, confirmed, missing, or not to be told. */
  readonly point: 'added' | 'seen' | 'not-seen' | 'unknown';
};
