import type { MethodKey, UnitKey } from '@/lib/domain/analytes';
import type { Label } from './labels/label';
import type { Value } from './stages/values';
import type { Box, Cell, Remark } from './types';

export type IdentityField =
  | 'sampleId'
  | 'labNumber'
  | 'fieldName'
  | 'depth'
  | 'depthTop'
  | 'depthBottom'
  | 'dateSampled'
  | 'dateReported'
  | 'other';

export type Identity = Partial<Record<IdentityField, string>>;

/** A number with everything known of it before samples are put together and the checks are made. */
export type Candidate = {
  readonly label: Label;
  readonly value: Value;
  readonly rating: string | null;
  readonly unit: UnitKey | null;
  readonly unitPrinted: string | null;
  readonly method: MethodKey | null;
  readonly methodPrinted: string | null;
  readonly page: number | null;
  readonly box: Box | null;
  readonly cell: Cell | null;
  /** 0 to 1: how surely this number stands in this row and column. */
  readonly position: number;
  readonly doubts: readonly Remark[];
};

/** The numbers of one sample as one part of the file shows them. */
export type SamplePart = { readonly identity: Identity; readonly candidates: readonly Candidate[] };

export function remark(code: string, sentence: string): Remark {
  return { code, sentence };
}
