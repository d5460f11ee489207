import type { UnitKey } from '@/lib/domain/analytes';
import { remark } from '../candidate';
import type { Remark } from '../types';
import type { HistoryValue } from './history';

export const LIGHT_SOIL = 'area-unit-light-soil';

/** g/cm3. Mineral soil lies at 1.0 to 1.6; peat and potting mixes at 0.1 to 0.6. */
const LIGHT = 0.7;
const PER_AREA: ReadonlySet<UnitKey> = new Set<UnitKey>(['lb/acre', 'kg/ha']);
const MIX = /\b(soilless|(potting|container|growing|greenhouse) (mix|soil|compost|media|medium))\b/i;

/**
 * A weight per acre stands for a slice of 2,000,000 lb of mineral soil. One laboratory printed it for a potting mix of
 * density 0.3, where the slice weighs a quarter of that. Answers the doubt of each such row; no number is changed.
 * Errors: none. Worked example: density 0.3 g/cm3 beside 240 lb/acre of potassium is asked about; 1.2 g/cm3 is not.
 */
export function lightSoilDoubt(sampleName: string | null, rows: readonly HistoryValue[]): Remark | null {
  const density = rows.find((row) => row.analyte === 'density' && row.unit === 'g/cm3' && row.value !== null);
  const light = density?.value != null ? density.value < LIGHT : MIX.test(sampleName ?? '');
  if (!light) return null;
  const what = density === undefined ? 'This sample is called a mix' : `This sample weighs ${density.printed} g/cm3`;
  return remark(
    LIGHT_SOIL,
    `${what}, while a number per acre or hectare stands for mineral soil of twice that weight and more. Take the ppm of the page, or ask the laboratory.`,
  );
}

export const isPerArea = (row: Pick<HistoryValue, 'unit'>): boolean => row.unit !== null && PER_AREA.has(row.unit);
