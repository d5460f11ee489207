import type { Plot } from '@/lib/schemas/plots';
import { numberReason, parseNumber } from '@/lib/ui/fields/parse-number';
import { boundsOf, outlineOf, placeAt } from '@/lib/ui/site-plan/geometry';
import { lengthNumber, readLength } from '@/lib/ui/site-plan/measure';
import type { LengthUnit, PlanOutline } from '@/lib/ui/site-plan/types';

/** A plot as its form holds it: every field as text, lengths and area in the person's unit. */
export const PLOT_FIELDS = {
  name: 'Name',
  left: 'From the left',
  bottom: 'From the bottom',
  width: 'Width',
  length: 'Length',
  areaTypedM2: 'Area, typed',
  texture: 'Texture',
  established: 'Ground',
  freeLimeSeen: 'Free lime seen',
  targetSetKey: 'Target set',
  crop: 'Crop',
  cropSetKey: 'Target set of the crop',
  notes: 'Notes',
} as const;
export type PlotField = keyof typeof PLOT_FIELDS;
export type PlotValues = Readonly<Record<PlotField, string>>;

const isField = (name: string): name is PlotField => name in PLOT_FIELDS;
const FIELD_NAMES: readonly PlotField[] = Object.keys(PLOT_FIELDS).filter(isField);
const M2_PER_SQ_FT = 0.3048 * 0.3048;

export const areaNumber = (m2: number, unit: LengthUnit): string =>
  String(Number((unit === 'ft' ? m2 / M2_PER_SQ_FT : m2).toFixed(1)));

export function plotValues(plot: Plot | null, unit: LengthUnit): PlotValues {
  const bounds = plot?.outline ? boundsOf(plot.outline) : null;
  const length = (metres: number | undefined) => (metres === undefined ? '' : lengthNumber(metres, unit));
  return {
    name: plot?.name ?? '',
    left: length(bounds?.minX),
    bottom: length(bounds?.minY),
    width: length(bounds ? bounds.maxX - bounds.minX : undefined),
    length: length(bounds ? bounds.maxY - bounds.minY : undefined),
    areaTypedM2: plot?.areaTypedM2 == null ? '' : areaNumber(plot.areaTypedM2, unit),
    texture: plot?.texture ?? '',
    established: plot?.established === false ? 'no' : 'yes',
    freeLimeSeen: plot?.freeLimeSeen ? 'on' : '',
    targetSetKey: plot?.targetSetKey ?? '',
    crop: plot?.planting?.crop ?? '',
    cropSetKey: plot?.planting?.targetSetKey ?? '',
    notes: plot?.notes ?? '',
  };
}

/** What the form holds now; a box that is not ticked sends nothing. */
export function asPlotValues(values: Readonly<Record<string, string>>): PlotValues {
  const now: Record<PlotField, string> = { ...plotValues(null, 'm'), established: '' };
  for (const field of FIELD_NAMES) now[field] = values[field] ?? '';
  return now;
}

export const changedFields = (now: PlotValues, before: PlotValues): PlotField[] =>
  FIELD_NAMES.filter((field) => now[field].trim() !== before[field].trim());

export type PlotBody = Partial<{
  name: string;
  outline: PlanOutline | null;
  areaTypedM2: number | null;
  texture: string | null;
  established: boolean;
  freeLimeSeen: boolean;
  targetSetKey: string | null;
  notes: string;
}>;
export type PlantingBody = { crop: string; targetSetKey: string | null };
export type ReadPlot =
  | { readonly ok: true; readonly plot: PlotBody; readonly planting: PlantingBody | 'none' | 'unchanged' }
  | { readonly ok: false; readonly errors: Partial<Record<PlotField, string>> };

const blankAsNull = (text: string) => (text === '' ? null : text);

/** Only what was changed: a rounded number left alone must not replace the exact one kept. */
export function readPlotValues(
  now: PlotValues,
  before: PlotValues,
  outline: PlanOutline | null,
  unit: LengthUnit,
): ReadPlot {
  const changed = new Set(changedFields(now, before));
  const errors: Partial<Record<PlotField, string>> = {};
  const plot: PlotBody = {};
  if (changed.has('name') || now.name.trim() === '') plot.name = now.name.trim();
  if (now.name.trim() === '') errors.name = 'Give the plot a name.';
  if ((['left', 'bottom', 'width', 'length'] as const).some((field) => changed.has(field))) {
    plot.outline = readOutline(now, changed, outline, unit, errors);
  }
  if (changed.has('areaTypedM2')) plot.areaTypedM2 = readArea(now.areaTypedM2, unit, errors);
  if (changed.has('texture')) plot.texture = blankAsNull(now.texture);
  if (changed.has('established')) plot.established = now.established !== 'no';
  if (changed.has('freeLimeSeen')) plot.freeLimeSeen = now.freeLimeSeen === 'on';
  if (changed.has('targetSetKey')) plot.targetSetKey = blankAsNull(now.targetSetKey);
  if (changed.has('notes')) plot.notes = now.notes;
  if (now.crop.trim() === '' && now.cropSetKey !== '') errors.crop = 'Name the crop this target set is for.';
  if (Object.keys(errors).length > 0) return { ok: false, errors };
  return { ok: true, plot, planting: readPlanting(now, changed) };
}

function readPlanting(now: PlotValues, changed: ReadonlySet<PlotField>): PlantingBody | 'none' | 'unchanged' {
  if (!changed.has('crop') && !changed.has('cropSetKey')) return 'unchanged';
  const crop = now.crop.trim();
  return crop === '' ? 'none' : { crop, targetSetKey: blankAsNull(now.cropSetKey) };
}

function readArea(text: string, unit: LengthUnit, errors: Partial<Record<PlotField, string>>): number | null {
  const read = parseNumber(text);
  if (!read.ok && read.reason === 'empty') return null;
  if (!read.ok) {
    errors.areaTypedM2 = numberReason[read.reason];
    return null;
  }
  // "400 m2" in a field of square feet means what it says.
  const feet = /^(sq\.?\s*ft|ft|square f)/i.test(read.unit) || (unit === 'ft' && !/^(m|sq\.?\s*m)/i.test(read.unit));
  const m2 = feet ? read.value * M2_PER_SQ_FT : read.value;
  if (m2 <= 0) errors.areaTypedM2 = 'The area must be more than nothing. Leave it empty to take it from the plan.';
  return Math.round(m2 * 10_000) / 10_000;
}

function readOutline(
  now: PlotValues,
  changed: ReadonlySet<PlotField>,
  outline: PlanOutline | null,
  unit: LengthUnit,
  errors: Partial<Record<PlotField, string>>,
): PlanOutline | null {
  if (now.width.trim() === '' && now.length.trim() === '') return null;
  const bounds = outline ? boundsOf(outline) : null;
  const read = (field: 'left' | 'bottom' | 'width' | 'length', exact: number | undefined, missing: number | null) => {
    if (!changed.has(field) && exact !== undefined) return exact;
    if (now[field].trim() === '' && missing !== null) return missing;
    const answer = readLength(now[field], unit);
    if (!answer.ok) {
      errors[field] =
        now[field].trim() === '' ? 'Give both, or leave both empty.' : 'Write a length like 12.5 or 41 ft.';
      return 0;
    }
    if (missing === null && answer.metres <= 0) errors[field] = 'Longer than nothing, please.';
    return answer.metres;
  };
  const rectangle = {
    x: read('left', bounds?.minX, 0),
    y: read('bottom', bounds?.minY, 0),
    width: read('width', bounds ? bounds.maxX - bounds.minX : undefined, null),
    height: read('length', bounds ? bounds.maxY - bounds.minY : undefined, null),
  };
  return outline ? placeAt(outline, rectangle) : outlineOf(rectangle);
}
