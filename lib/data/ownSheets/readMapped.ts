import { clean } from '@/lib/reading/labels/normal';
import { type AppliedMapping, applyMapping, type OwnMapping } from '@/lib/reading/ownSheet';
import type { ReadResult, ReadSample } from '@/lib/reading/types';
import { unitBasisOf } from '../review/unitBasis';
import { impossibleSentence } from '../review/valueRules';
import { type SheetRow, sheetOf } from './sheetStore';

/** Rows of a sheet that names no place share one name, so that one plot can be chosen for them. */
export const NAMELESS = 'Rows without a name';

const LONGEST_NAME = 200;

/** A cell may hold a line break or a character that is not seen; a name is one line. */
export const nameOf = (sample: Pick<ReadSample, 'fieldName' | 'sampleId' | 'labNumber'>): string => {
  const [name] = [sample.fieldName, sample.sampleId, sample.labNumber].map((one) => clean(one ?? '')).filter(Boolean);
  return name?.slice(0, LONGEST_NAME).trim() ?? NAMELESS;
};

export const readMapped = (row: SheetRow, mapping: OwnMapping, fileName: string): AppliedMapping =>
  applyMapping({ fileName, sheet: sheetOf(row, mapping.sheet), mapping });

const facts = (read: ReadResult) => ({
  analyte: read.analyte,
  printed: read.printed,
  value: read.value === null ? null : String(read.value),
  qualifier: read.qualifier,
  unit: read.unit,
  method: read.method,
  form: read.form,
});

/** What one live result is told apart by; a second one of the same kind in a sample cannot stand beside the first. */
const kindOf = (read: ReadResult) =>
  [read.analyte, read.method ?? '', read.form ?? '', unitBasisOf(read.unit, read.analyte)].join('|');

/** Why a number of a sample cannot be taken, in a sentence; null where it can. In the order of the sample's numbers. */
export function faultsOf(sample: ReadSample): (string | null)[] {
  const seen = new Set<string>();
  return sample.results.map((read) => {
    const impossible = impossibleSentence(facts(read));
    if (impossible !== null) return impossible;
    if (read.value === null && read.qualifier !== 'nd' && read.qualifier !== 'trace')
      return 'There is no number in it.';
    const kind = kindOf(read);
    if (seen.has(kind)) return 'Another column of this row holds the same analyte; the first one is taken.';
    seen.add(kind);
    return null;
  });
}
