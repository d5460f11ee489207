import type { AnalyteKey, UnitKey } from '@/lib/domain/analytes';
import { remark } from '../candidate';
import type { Remark } from '../types';
import type { HistoryValue } from './history';
import { MG_KG_PER_MEQ } from './plausible';

/** What these checks say; a second look takes the old answers away first. */
export const BASIS_CODES: ReadonlySet<string> = new Set([
  'area-unit-light-soil',
  'shares-of-bases',
  'saturation-apart',
]);

/** g/cm3. Mineral soil lies at 1.0 to 1.6; peat and potting mixes at 0.1 to 0.6. */
const LIGHT = 0.7;
const PER_AREA: ReadonlySet<UnitKey> = new Set<UnitKey>(['lb/acre', 'kg/ha']);
const MIX = /\b(soilless|(potting|container|growing|greenhouse) (mix|soil|compost|media|medium))\b/i;
/** Points of per cent that rounding of three or four printed shares can make. */
const ROUNDING = 1.5;
/** Below this a soil holds some acidity, so bases cannot fill its whole capacity. */
const ACID_PH = 6.6;
/** Points of per cent between two ways to a base saturation that no rounding makes. */
const APART = 12;

const BASES: readonly AnalyteKey[] = ['calcium', 'magnesium', 'potassium', 'sodium'];
const SHARES: readonly AnalyteKey[] = ['sat_ca', 'sat_mg', 'sat_k', 'sat_na', 'other_bases'];

const numberOf = (rows: readonly HistoryValue[], key: AnalyteKey, unit: UnitKey): number | null =>
  rows.find((row) => row.analyte === key && row.unit === unit && row.qualifier === '=')?.value ?? null;

function lightSoil(sampleName: string | null, rows: readonly HistoryValue[]): Remark | null {
  const density = rows.find((row) => row.analyte === 'density' && row.unit === 'g/cm3' && row.value !== null);
  const light = density?.value != null ? density.value < LIGHT : MIX.test(sampleName ?? '');
  if (!light) return null;
  const what = density === undefined ? 'This sample is called a mix' : `This sample weighs ${density.printed} g/cm3`;
  return remark(
    'area-unit-light-soil',
    `${what}, while a number per acre or hectare stands for mineral soil of twice that weight and more. Take the ppm of the page, or ask the laboratory.`,
  );
}

function sharesOfBases(rows: readonly HistoryValue[]): Remark | null {
  const shares = rows.filter((row) => SHARES.includes(row.analyte) && row.unit === '%' && row.value !== null);
  const has = (key: AnalyteKey) => shares.some((row) => row.analyte === key);
  if (!has('sat_ca') || !has('sat_mg') || !has('sat_k') || shares.some((row) => row.method !== null)) return null;
  if (rows.some((row) => row.analyte === 'sat_h')) return null;
  const sum = shares.reduce((total, row) => total + (row.value ?? 0), 0);
  const ph = numberOf(rows, 'soil_ph_water', 'pH') ?? numberOf(rows, 'soil_ph_salt', 'pH');
  if (Math.abs(sum - 100) > ROUNDING || ph === null || ph >= ACID_PH) return null;
  return remark(
    'shares-of-bases',
    `The shares add to ${Math.round(sum)} without any acidity, at pH ${ph}. They look like shares of the bases, not of the exchange capacity.`,
  );
}

function meq(rows: readonly HistoryValue[], key: AnalyteKey): number | null {
  const direct = numberOf(rows, key, 'meq/100g');
  const mass = numberOf(rows, key, 'mg/kg');
  const weight = MG_KG_PER_MEQ[key];
  return direct ?? (mass === null || weight === undefined ? null : mass / weight);
}

function saturationApart(rows: readonly HistoryValue[]): Remark | null {
  const printed = rows.find((row) => row.analyte === 'base_saturation' && row.unit === '%' && row.value !== null);
  const cec = numberOf(rows, 'cec', 'meq/100g');
  const [ca, mg, k, na] = BASES.map((key) => meq(rows, key));
  if (printed?.value == null || cec === null || cec <= 0 || ca == null || mg == null || k == null) return null;
  const counted = (100 * (ca + mg + k + (na ?? 0))) / cec;
  if (Math.abs(Math.min(counted, 100) - printed.value) <= APART) return null;
  return remark(
    'saturation-apart',
    `The bases of this page make ${Math.round(counted)} % of its exchange capacity; it prints ${printed.printed} %. Some laboratories work the share out from pH alone; then it is no separate sign of what lime did.`,
  );
}

/**
 * What a printed number is a part of, where the page and the soil do not fit. Purpose: weights per acre were printed for a
 * potting mix of density 0.3; a "% of bases" column was per cent of three bases and not of the capacity; and one
 * laboratory's base saturation came from pH alone. Method: density below 0.7 g/cm3 beside lb/acre or kg/ha; shares that add
 * to 100 on an acid soil without acidity; base saturation more than 12 points from bases over capacity.
 * Raises questions only. Errors: none. Worked example: K 5, Ca 75, Mg 20 % at pH 5.9 are asked about; at pH 7.2 they are not.
 */
export function basisDoubts<Row extends HistoryValue>(
  sampleName: string | null,
  rows: readonly Row[],
): ReadonlyMap<Row, readonly Remark[]> {
  const light = lightSoil(sampleName, rows);
  const shares = sharesOfBases(rows);
  const apart = saturationApart(rows);
  return new Map(
    rows.map((row) => [
      row,
      [
        ...(light !== null && row.unit !== null && PER_AREA.has(row.unit) ? [light] : []),
        ...(shares !== null && SHARES.includes(row.analyte) ? [shares] : []),
        ...(apart !== null && row.analyte === 'base_saturation' ? [apart] : []),
      ],
    ]),
  );
}
