/**
 * What an amount of material is per weight of soil. Pounds and square feet, as labels print them.
 *
 * 1 g/cm3 = 62.42796 lb/ft3; 1 lb = 453.59237 g (definitions). Sulfur 32.06 and CaCO3 100.0869 g/mol (standard atomic
 * weights), two moles of charge each. Worked example: 1.3 g/cm3 and 6 in give 40,578 lb of soil under 1,000 sq ft, and 10 lb
 * of sulfur there 1.537 cmol of acid per kg.
 */
const LB_PER_FT3 = 62.42796;
const G_PER_LB = 453.59237;
const S_MOLAR = 32.06;
const CACO3_MOLAR = 100.0869;

export type Slice = { readonly densityGPerCm3: number; readonly depthIn: number };

export const soilLbPer1000SqFt = (slice: Slice): number =>
  (slice.densityGPerCm3 * LB_PER_FT3 * 1000 * slice.depthIn) / 12;

/** ppm of an element from lb per 1,000 sq ft: the element's share of the product, times the share the extractant finds. */
export const ppmGain = (lb: number, elementShare: number, found: number, slice: Slice): number =>
  (lb * elementShare * found * 1e6) / soilLbPer1000SqFt(slice);

const cmolPerKg = (lb: number, molar: number, slice: Slice): number =>
  ((lb * G_PER_LB) / molar) * 2 * (100 / ((soilLbPer1000SqFt(slice) * G_PER_LB) / 1000));

export const acidFromSulfur = (lb: number, slice: Slice): number => cmolPerKg(lb, S_MOLAR, slice);
export const baseFromLime = (lbCaCO3: number, slice: Slice): number => cmolPerKg(lbCaCO3, CACO3_MOLAR, slice);

/** pH change from sulfur; free lime (per cent CaCO3) is used up first. `buffering` is cmol per kg and pH. */
export function phChangeFromSulfur(input: {
  readonly lb: number;
  readonly purity: number;
  readonly reacted: number;
  readonly buffering: number;
  readonly slice: Slice;
  readonly freeLimePercent?: number;
}): number {
  const lime = (((input.freeLimePercent ?? 0) * 10) / CACO3_MOLAR) * 2 * 100;
  const acid = acidFromSulfur(input.lb * input.purity, input.slice) * input.reacted - lime;
  return acid > 0 ? -acid / input.buffering : 0;
}
