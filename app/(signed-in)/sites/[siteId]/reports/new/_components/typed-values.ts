import { numberReason, parseNumber } from '@/lib/ui/fields/parse-number';

export type DepthUnit = 'in' | 'cm';
export type TypedSample = {
  name: string | null;
  labNumber: string | null;
  plotId: string | null;
  takenOn: string | null;
  depthFromCm: number | null;
  depthToCm: number | null;
};
export type TypedBody = {
  laboratoryId: string | null;
  laboratoryName: string | null;
  samples: TypedSample[];
};
export const OTHER_LABORATORY = 'other';

const CM_PER_INCH = 2.54;
const textOrNull = (text: string | undefined) => (text?.trim() ? text.trim() : null);

/** The form of a report that is typed in, as the API takes it; sentences by field name where it cannot be. */
export function readTyped(
  values: Readonly<Record<string, string>>,
  rows: readonly number[],
  unit: DepthUnit,
): { ok: true; body: TypedBody } | { ok: false; errors: Record<string, string> } {
  const errors: Record<string, string> = {};
  const depth = (field: string): number | null => {
    const read = parseNumber(values[field] ?? '');
    if (read.ok) return Math.round((unit === 'in' ? read.value * CM_PER_INCH : read.value) * 100) / 100;
    if (read.reason !== 'empty') errors[field] = numberReason[read.reason];
    return null;
  };
  const samples = rows.map((row) => {
    const [depthFromCm, depthToCm] = [depth(`from-${row}`), depth(`to-${row}`)];
    if (depthToCm === null && depthFromCm !== null && !errors[`to-${row}`]) errors[`to-${row}`] = 'Down to what depth?';
    if (depthToCm !== null && (depthFromCm ?? 0) >= depthToCm)
      errors[`to-${row}`] = 'The lower end must be deeper than the upper.';
    return {
      name: textOrNull(values[`name-${row}`]),
      labNumber: textOrNull(values[`number-${row}`]),
      plotId: textOrNull(values[`plot-${row}`]),
      takenOn: textOrNull(values[`day-${row}`]),
      depthFromCm: depthToCm === null ? depthFromCm : (depthFromCm ?? 0),
      depthToCm,
    };
  });
  const chosen = values.laboratory ?? '';
  const named = textOrNull(values.laboratoryName);
  const fresh = chosen === OTHER_LABORATORY || chosen === '';
  if (chosen === OTHER_LABORATORY && named === null) errors.laboratoryName = 'Which laboratory?';
  if (Object.keys(errors).length > 0) return { ok: false, errors };
  return {
    ok: true,
    body: { laboratoryId: fresh ? null : chosen, laboratoryName: fresh ? named : null, samples },
  };
}

/** "samples.1.takenOn" of a refusal, as the form names that field. */
export function formField(path: string, rows: readonly number[]): string {
  const [top, at, field] = path.split('.');
  const row = rows[Number(at)];
  if (top !== 'samples' || row === undefined || field === undefined) return path;
  const names: Record<string, string> = {
    name: 'name',
    labNumber: 'number',
    plotId: 'plot',
    takenOn: 'day',
    depthFromCm: 'from',
    depthToCm: 'to',
  };
  return `${names[field] ?? field}-${row}`;
}
