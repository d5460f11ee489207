import type { UnitBasis } from '@/db/schema';
import { unitOf } from '@/lib/domain/analytes';

const PH = new Set(['soil_ph_water', 'soil_ph_salt', 'buffer_ph']);

/** What one divides by. A pH needs no unit to be one; any other number without a unit is charted only with its like. */
export function unitBasisOf(unit: string | null, analyte: string): UnitBasis {
  if (unit !== null) return unitOf(unit)?.basis ?? 'none';
  return PH.has(analyte) ? 'index' : 'none';
}

/** Exact by the names of the units; a weight per area or volume needs depth or density and has none here. */
const MG_PER_KG: ReadonlyMap<string, number> = new Map([
  ['mg/kg', 1],
  ['mg/100g', 10],
  ['mg/g', 1000],
  ['g/kg', 1000],
]);

/** mg/kg, rounded to the figures a double carries honestly; null where that would be a guess. */
export function milligramsPerKilogram(value: string | null, unit: string | null): string | null {
  const factor = unit === null ? undefined : MG_PER_KG.get(unit);
  if (value === null || factor === undefined) return null;
  return factor === 1 ? value : String(Number((Number(value) * factor).toPrecision(15)));
}
