import { analyte, isAnalyteKey } from '@/lib/domain/analytes';
import type { Blocker } from '@/lib/schemas/review';
import type { OtherForms } from './loadOtherForms';
import type { RowColumns } from './reviewRow';
import type { SampleColumns } from './sampleStore';
import { unitBasisOf } from './unitBasis';
import { impossibleSentence } from './valueRules';

type Found = Omit<Blocker, 'reportSampleId' | 'rowId'> & { rowId?: string };

export const sampleName = (
  sample: Pick<SampleColumns, 'printedName' | 'fieldName' | 'labNumber' | 'ordinal'>,
): string => sample.fieldName ?? sample.printedName ?? sample.labNumber ?? `Sample ${sample.ordinal}`;

const labelOf = (key: string | null) => (key !== null && isAnalyteKey(key) ? analyte(key).label : 'A row');

/** What one live result is told apart by; two of them in one sample cannot both stand. */
const resultKey = (row: RowColumns) =>
  [row.analyte, row.method ?? '', row.form ?? '', unitBasisOf(row.unit, row.analyte ?? '')].join('|');

function rowFaults(name: string, rows: readonly RowColumns[]): Found[] {
  const faults: Found[] = [];
  const seen = new Set<string>();
  for (const row of rows) {
    if (row.analyte === null) {
      const words = row.label || row.printed || 'without a name';
      faults.push({
        code: 'no-analyte',
        sentence: `${name}: say what the row "${words}" measures, or remove it.`,
        rowId: row.id,
      });
      continue;
    }
    const label = labelOf(row.analyte);
    const impossible = impossibleSentence(row);
    if (impossible) faults.push({ code: 'impossible', sentence: `${name}: ${impossible}`, rowId: row.id });
    if (row.value === null && row.qualifier !== 'nd' && row.qualifier !== 'trace') {
      faults.push({
        code: 'no-value',
        sentence: `${name}: ${label} has no value. Type it in or remove the row.`,
        rowId: row.id,
      });
    }
    const key = resultKey(row);
    if (seen.has(key)) {
      faults.push({
        code: 'twice',
        sentence: `${name}: ${label} stands there twice. Remove one, or say how their methods differ.`,
        rowId: row.id,
      });
    }
    seen.add(key);
  }
  return faults;
}

function sampleFaults(
  sample: SampleColumns,
  rows: readonly RowColumns[],
  forms: OtherForms,
  separate: ReadonlySet<string>,
): Found[] {
  const name = sampleName(sample);
  const form = forms.get(sample.id);
  if (sample.sameAsId !== null) {
    if (form?.sameAs?.reportState === 'confirmed') return [];
    const sentence = `${name} is the same analysis as one in ${form?.sameAs?.fileName ?? 'another report'}, which is not confirmed. Confirm that one first, or let this one stand for itself.`;
    return [{ code: 'same-as-open', sentence }];
  }
  const faults: Found[] = [];
  if (sample.plotId === null)
    faults.push({ code: 'no-plot', sentence: `${name}: choose its plot, or leave it out and say why.` });
  if (sample.takenOn === null)
    faults.push({ code: 'no-day', sentence: `${name}: enter the day the sample was taken.` });
  if (rows.length === 0)
    faults.push({ code: 'no-value', sentence: `${name} has no values. Type them in, or leave the sample out.` });
  faults.push(...rowFaults(name, rows));
  const twin = form?.candidates.find((one) => one.reportState === 'confirmed');
  if (twin && !separate.has(sample.id)) {
    const sentence = `${name} looks like the analysis that is already confirmed from ${twin.fileName ?? 'another report'} (${twin.equal} of ${twin.shared} values are equal). Say whether it is the same, so that it does not count twice.`;
    faults.push({ code: 'same-analysis', sentence });
  }
  return faults;
}

/** Everything that stands between a review and its confirmation, sample by sample. */
export function blockersOf(input: {
  samples: readonly SampleColumns[];
  rows: readonly RowColumns[];
  forms: OtherForms;
  separateAnalyses?: readonly string[];
}): Blocker[] {
  const counted = input.samples.filter((sample) => sample.leftOutReason === null);
  if (counted.length === 0) {
    const sentence =
      input.samples.length === 0
        ? 'There is no sample in this report yet. Add one, or set the report aside.'
        : 'Every sample is left out, so there is nothing to confirm. Set the report aside instead.';
    return [{ code: 'no-samples', sentence, reportSampleId: null, rowId: null }];
  }
  const separate = new Set(input.separateAnalyses ?? []);
  return counted.flatMap((sample) => {
    const rows = input.rows.filter((row) => row.reportSampleId === sample.id && row.state !== 'removed');
    return sampleFaults(sample, rows, input.forms, separate).map(({ rowId, ...fault }) => ({
      ...fault,
      reportSampleId: sample.id,
      rowId: rowId ?? null,
    }));
  });
}
