import type { AnalyteKey, MethodKey, Qualifier, UnitKey } from '@/lib/domain/analytes';

/** [x0, y0, x1, y1] as fractions of the page as stored: crop box, /Rotate not applied, origin top left, y down. */
export type Box = readonly [number, number, number, number];

/** A word as the file places it. `direction` is the way its text runs on the stored page, in degrees clockwise. */
export type Word = {
  readonly text: string;
  readonly x0: number;
  readonly y0: number;
  readonly x1: number;
  readonly y1: number;
  /** Height of the type in points. */
  readonly size: number;
  readonly direction: 0 | 90 | 180 | 270;
};

/** A page as stored: width and height of the crop box in points, before /Rotate. */
export type Page = {
  readonly number: number;
  readonly width: number;
  readonly height: number;
  readonly rotation: 0 | 90 | 180 | 270;
  readonly words: readonly Word[];
};

/** A remark with a stable code and a sentence for the grower. */
export type Remark = { readonly code: string; readonly sentence: string };

export type Cell = { readonly sheet: number; readonly row: number; readonly column: number };

export type ReadResult = {
  readonly analyte: AnalyteKey;
  readonly label: string;
  readonly printed: string;
  readonly value: number | null;
  readonly qualifier: Qualifier;
  readonly unit: UnitKey | null;
  readonly unitPrinted: string | null;
  /** element, P2O5, K2O, NO3, SO4; null where the question does not arise (pH, shares, texture). */
  readonly form: string | null;
  readonly method: MethodKey | null;
  readonly methodPrinted: string | null;
  readonly rating: string | null;
  readonly primary: boolean;
  readonly page: number | null;
  readonly box: Box | null;
  readonly cell: Cell | null;
  readonly confidence: number;
  readonly doubts: readonly Remark[];
};

export type Depth = { readonly top: number; readonly bottom: number; readonly unit: 'in' | 'cm' };

export type ReadSample = {
  readonly sampleId: string | null;
  readonly labNumber: string | null;
  readonly fieldName: string | null;
  readonly depth: Depth | null;
  readonly dateSampled: string | null;
  readonly dateSampledPrinted: string | null;
  readonly dateReported: string | null;
  readonly dateReportedPrinted: string | null;
  readonly results: readonly ReadResult[];
};

export type ReadRecommendation = {
  readonly sampleId: string | null;
  readonly item: string;
  readonly amount: number | null;
  readonly printed: string;
  readonly unit: string | null;
  readonly page: number | null;
  readonly box: Box | null;
};

/** What the reader hands over for one file: the object of the `read` command, the same in the worker. */
export type Reading = {
  readonly file: string;
  readonly kind: 'soil' | 'not-soil' | 'refused';
  readonly error: Remark | null;
  readonly pages: number;
  readonly warnings: readonly Remark[];
  readonly lab: { readonly name: string | null };
  readonly samples: readonly ReadSample[];
  readonly recommendations: readonly ReadRecommendation[];
};

/** Raised each time the reader changes in a way that can change its answer. */
export const READER_VERSION = '2';

/** A reading that took nothing, with the reason. */
export function refusedReading(input: { file: string; pages: number; error: Remark }): Reading {
  return {
    file: input.file,
    kind: 'refused',
    error: input.error,
    pages: input.pages,
    warnings: [],
    lab: { name: null },
    samples: [],
    recommendations: [],
  };
}
