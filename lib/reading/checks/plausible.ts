import { type AnalyteKey, analyte } from '@/lib/domain/analytes';
import { remark } from '../candidate';
import type { ReadResult, Remark } from '../types';

/** mg/kg that one meq/100 g weighs: ten times the equivalent weight (atomic weight over charge). */
export const MG_KG_PER_MEQ: Partial<Record<AnalyteKey, number>> = {
  calcium: 200.4,
  magnesium: 121.5,
  potassium: 391,
  sodium: 229.9,
  aluminium: 89.9,
};

/** Range in the result's own unit, or null when the registry has none for it. */
function rangeFor(result: ReadResult): readonly [number, number] | null {
  const entry = analyte(result.analyte);
  const method = entry.methods.find((one) => one.key === result.method);
  const unit = method?.plausibleUnit ?? entry.unit;
  const range = method?.plausible ?? entry.plausible;
  if (range === null || range === undefined || result.unit === null) return null;
  const form =
    result.form === 'P2O5'
      ? 2.29
      : result.form === 'K2O'
        ? 1.2
        : result.form === 'NO3'
          ? 4.43
          : result.form === 'SO4'
            ? 3
            : 1;
  if (result.unit === unit) return [range[0] * form, range[1] * form];
  // Twice the ppm range: the usual slice of 2,000,000 lb; wide enough for other depths to pass.
  if (unit === 'mg/kg' && (result.unit === 'lb/acre' || result.unit === 'kg/ha'))
    return [range[0] * form, range[1] * 2.5 * form];
  if (unit === 'mg/kg' && (result.unit === 'mg/L' || result.unit === 'mg/dm3'))
    return [range[0] * form * 0.3, range[1] * 1.5 * form];
  const weight = MG_KG_PER_MEQ[result.analyte];
  if (unit === 'mg/kg' && result.unit === 'meq/100g' && weight !== undefined)
    return [range[0] / weight, range[1] / weight];
  return null;
}

/** A value outside the believable range is kept as printed and doubted; a lost decimal point is named when it fits. */
export function plausibleDoubt(result: ReadResult): Remark | null {
  const range = rangeFor(result);
  if (range === null || result.value === null) return null;
  const [low, high] = range;
  if (result.value < 0) return remark('implausible', `${result.printed} is below zero.`);
  if (result.value >= low && result.value <= high) return null;
  if (result.qualifier !== '=' && result.value <= high) return null;
  const shifted = [10, 100]
    .map((by) => (result.value === null ? 0 : result.value / by))
    .find((value) => value >= low && value <= high);
  const name = analyte(result.analyte).label;
  const number = (value: number) => Number(value.toPrecision(3)).toString();
  const hint = shifted !== undefined && !result.printed.includes('.') ? ` Was ${number(shifted)} meant?` : '';
  return remark('implausible', `${name} of ${result.printed} lies outside ${number(low)} to ${number(high)}.${hint}`);
}
