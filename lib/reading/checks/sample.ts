import type { AnalyteKey } from '@/lib/domain/analytes';
import { remark } from '../candidate';
import type { ReadResult, Remark } from '../types';
import { MG_KG_PER_MEQ } from './plausible';

/** Tolerances: printed shares are rounded, laboratories round and use slightly different weights. */
const SHARE_TOLERANCE = 4;
const CEC_TOLERANCE = 0.15;
const CEC_FLOOR = 1;
const MEQ_TOLERANCE = 0.08;

export type Raise = (result: ReadResult, doubt: Remark) => void;

function find(results: readonly ReadResult[], key: AnalyteKey, unit?: string): ReadResult | undefined {
  return results.find(
    (result) =>
      result.analyte === key &&
      result.value !== null &&
      result.qualifier === '=' &&
      (unit === undefined || result.unit === unit),
  );
}

function checkShares(results: readonly ReadResult[], raise: Raise) {
  const keys: readonly AnalyteKey[] = ['sat_k', 'sat_ca', 'sat_mg', 'sat_na', 'sat_h', 'other_bases'];
  const shares = keys.flatMap((key) => find(results, key, '%') ?? []);
  const names = new Set(shares.map((share) => share.analyte));
  if (!names.has('sat_k') || !names.has('sat_ca') || !names.has('sat_mg')) return;
  const sum = shares.reduce((total, share) => total + (share.value ?? 0), 0);
  const ofBases = shares.some((share) => share.method === 'of_bases');
  const bases = find(results, 'base_saturation', '%')?.value;
  const expected = names.has('sat_h') || ofBases ? 100 : (bases ?? null);
  const off = expected === null ? sum > 100 + SHARE_TOLERANCE : Math.abs(sum - expected) > SHARE_TOLERANCE;
  if (!off) return;
  const text = `The shares add to ${Math.round(sum * 10) / 10}, not ${expected ?? 'at most 100'}.`;
  for (const share of shares) raise(share, remark('shares-off', text));
}

/** Charge in meq/100 g; lb/acre only under the usual slice of 2,000,000 lb an acre. */
function charge(results: readonly ReadResult[], key: AnalyteKey): number | null {
  const direct = find(results, key, 'meq/100g')?.value;
  if (direct !== undefined && direct !== null) return direct;
  const weight = MG_KG_PER_MEQ[key];
  if (weight === undefined) return null;
  const mass = find(results, key, 'mg/kg')?.value;
  if (mass !== undefined && mass !== null) return mass / weight;
  const area = find(results, key, 'lb/acre')?.value;
  return area === undefined || area === null ? null : area / 2 / weight;
}

function checkCations(results: readonly ReadResult[], raise: Raise) {
  const cec = find(results, 'cec', 'meq/100g');
  if (cec?.value == null || ['NH4OAc_pH7', 'NaOAc', 'effective'].includes(cec.method ?? '')) return;
  const [ca, mg, k, na] = [
    charge(results, 'calcium'),
    charge(results, 'magnesium'),
    charge(results, 'potassium'),
    charge(results, 'sodium'),
  ];
  if (ca === null || mg === null || k === null) return;
  const bases = ca + mg + k + (na ?? 0);
  const acidity = find(results, 'exchangeable_acidity', 'meq/100g')?.value ?? null;
  const share = find(results, 'sat_h', '%')?.value ?? null;
  const base = find(results, 'base_saturation', '%')?.value ?? null;
  const acid =
    acidity ?? (share === null ? (base === null ? null : (cec.value * (100 - base)) / 100) : (cec.value * share) / 100);
  const allowed = Math.max(CEC_FLOOR, CEC_TOLERANCE * cec.value);
  const sum = bases + (acid ?? 0);
  const off = acid === null ? sum > cec.value + allowed : Math.abs(sum - cec.value) > allowed;
  if (!off) return;
  const text = `Calcium, magnesium, potassium${na === null ? '' : ', sodium'}${acid === null ? '' : ' and acidity'} make ${sum.toFixed(1)} meq/100 g; the page gives a capacity of ${cec.printed}.`;
  for (const result of results) {
    if (['cec', 'calcium', 'magnesium', 'potassium'].includes(result.analyte))
      raise(result, remark('cations-off', text));
  }
}

function checkTwoUnits(results: readonly ReadResult[], raise: Raise) {
  for (const [key, weight] of Object.entries(MG_KG_PER_MEQ)) {
    const mass = results.find((result) => result.analyte === key && result.unit === 'mg/kg');
    const meq = results.find((result) => result.analyte === key && result.unit === 'meq/100g');
    if (mass?.value == null || meq?.value == null || meq.value < 0.3) continue;
    if (Math.abs(mass.value / weight - meq.value) <= Math.max(MEQ_TOLERANCE * meq.value, 0.06)) continue;
    const text = `${mass.printed} ppm is ${(mass.value / weight).toFixed(2)} meq/100 g; the page gives ${meq.printed}.`;
    for (const result of [mass, meq]) raise(result, remark('ppm-meq-off', text));
  }
}

function checkTwice(results: readonly ReadResult[], raise: Raise) {
  const seen = new Map<string, ReadResult>();
  for (const result of results) {
    const key = [result.analyte, result.unit, result.method, result.form].join('|');
    const other = seen.get(key);
    if (other === undefined) seen.set(key, result);
    else if (other.value !== result.value) {
      const doubt = remark('two-readings', `Two readings differ: ${other.printed} and ${result.printed}.`);
      raise(other, doubt);
      raise(result, doubt);
    }
  }
}

/** The document checks the reader: shares near 100, cations against capacity, ppm against meq, one number twice. */
export function checkSample(results: readonly ReadResult[], raise: Raise) {
  checkShares(results, raise);
  checkCations(results, raise);
  checkTwoUnits(results, raise);
  checkTwice(results, raise);
}
