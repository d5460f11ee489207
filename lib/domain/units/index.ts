/**
 * Units of the ground and of amounts, with the few conversions the screens need. A conversion that lacks a figure refuses.
 *
 * Definitions: 1 ft = 0.3048 m, 1 in = 2.54 cm, 1 lb = 0.45359237 kg (international yard and pound, 1959); an acre is
 * 43,560 sq ft. P2O5 and K2O by standard atomic weights (P 30.974, K 39.098, O 15.999). lb per acre is a weight of the
 * element in a slice of soil: it needs that slice's weight (Penn State: twice the ppm for the 2,000,000 lb of about 6 2/3 in).
 * Worked examples: 1,000 sq ft = 92.90304 m2; 1 lb per 1,000 sq ft = 4.88243 g/m2.
 */
declare const unitBrand: unique symbol;
type Quantity<Name extends string> = number & { readonly [unitBrand]: Name };

export type SquareMetres = Quantity<'m2'>;
export type SquareFeet = Quantity<'ft2'>;
export type Centimetres = Quantity<'cm'>;
export type Inches = Quantity<'in'>;
export type Kilograms = Quantity<'kg'>;
export type Pounds = Quantity<'lb'>;
export type GramsPerM2 = Quantity<'g/m2'>;
export type LbPer1000SqFt = Quantity<'lb/1000ft2'>;
export type LbPerAcre = Quantity<'lb/acre'>;
export type MgPerKg = Quantity<'mg/kg'>;

/** 'customary' is inches, square feet and pounds; 'metric' is centimetres, square metres and kilograms. */
export type UnitPreference = 'customary' | 'metric';

const checked =
  <Unit extends number>(name: string) =>
  (value: number): Unit => {
    if (!Number.isFinite(value) || value < 0) throw new RangeError(`${value} ${name} is no quantity.`);
    return value as Unit;
  };

export const squareMetres = checked<SquareMetres>('m2');
export const squareFeet = checked<SquareFeet>('sq ft');
export const centimetres = checked<Centimetres>('cm');
export const inches = checked<Inches>('in');
export const kilograms = checked<Kilograms>('kg');
export const pounds = checked<Pounds>('lb');
export const gramsPerM2 = checked<GramsPerM2>('g/m2');
export const lbPer1000SqFt = checked<LbPer1000SqFt>('lb per 1,000 sq ft');
export const lbPerAcre = checked<LbPerAcre>('lb/acre');
export const mgPerKg = checked<MgPerKg>('mg/kg');

const M2_PER_FT2 = 0.3048 ** 2;
const CM_PER_IN = 2.54;
const KG_PER_LB = 0.45359237;
const FT2_PER_ACRE = 43_560;
const G_PER_M2_OF_LB_PER_1000 = (KG_PER_LB * 1000) / (1000 * M2_PER_FT2);
const P_ATOM = 30.974;
const K_ATOM = 39.098;
const O_ATOM = 15.999;
const P_IN_P2O5 = (2 * P_ATOM) / (2 * P_ATOM + 5 * O_ATOM);
const K_IN_K2O = (2 * K_ATOM) / (2 * K_ATOM + O_ATOM);

export const toSquareMetres = (area: SquareFeet): SquareMetres => squareMetres(area * M2_PER_FT2);
export const toSquareFeet = (area: SquareMetres): SquareFeet => squareFeet(area / M2_PER_FT2);
export const toCentimetres = (depth: Inches): Centimetres => centimetres(depth * CM_PER_IN);
export const toInches = (depth: Centimetres): Inches => inches(depth / CM_PER_IN);
export const toKilograms = (mass: Pounds): Kilograms => kilograms(mass * KG_PER_LB);
export const toPounds = (mass: Kilograms): Pounds => pounds(mass / KG_PER_LB);
export const toGramsPerM2 = (rate: LbPer1000SqFt): GramsPerM2 => gramsPerM2(rate * G_PER_M2_OF_LB_PER_1000);
export const toLbPer1000SqFt = (rate: GramsPerM2): LbPer1000SqFt => lbPer1000SqFt(rate / G_PER_M2_OF_LB_PER_1000);
export const acreToThousand = (rate: LbPerAcre): LbPer1000SqFt => lbPer1000SqFt((rate * 1000) / FT2_PER_ACRE);

/** Weight of the element in a weight of the oxide, and back; any unit of weight. */
export const elementOfOxide = (oxide: 'P2O5' | 'K2O', amount: number): number =>
  amount * (oxide === 'P2O5' ? P_IN_P2O5 : K_IN_K2O);
export const oxideOfElement = (oxide: 'P2O5' | 'K2O', amount: number): number =>
  amount / (oxide === 'P2O5' ? P_IN_P2O5 : K_IN_K2O);

/** What says how much soil lies under an acre: the weight a laboratory states, or depth with density. */
export type SoilSlice =
  | { readonly statedLbPerAcre: number }
  | { readonly depth: Inches; readonly densityGPerCm3: number }
  | { readonly depth: Inches }
  | Record<string, never>;

export type NoSlice = { readonly ok: false; readonly reason: 'depth-missing' | 'density-missing' };

const LB_PER_FT3_OF_G_PER_CM3 = 62.42796;

function sliceWeight(slice: SoilSlice): { ok: true; lb: number } | NoSlice {
  if ('statedLbPerAcre' in slice && slice.statedLbPerAcre !== undefined) return { ok: true, lb: slice.statedLbPerAcre };
  if (!('depth' in slice) || slice.depth === undefined) return { ok: false, reason: 'depth-missing' };
  if (!('densityGPerCm3' in slice)) return { ok: false, reason: 'density-missing' };
  return { ok: true, lb: (FT2_PER_ACRE * slice.depth * slice.densityGPerCm3 * LB_PER_FT3_OF_G_PER_CM3) / 12 };
}

/** Refused without the slice: lb per acre means nothing when nobody says how deep. */
export function lbPerAcreToMgPerKg(value: LbPerAcre, slice: SoilSlice): { ok: true; value: MgPerKg } | NoSlice {
  const weight = sliceWeight(slice);
  return weight.ok ? { ok: true, value: mgPerKg((value * 1e6) / weight.lb) } : weight;
}

export function mgPerKgToLbPerAcre(value: MgPerKg, slice: SoilSlice): { ok: true; value: LbPerAcre } | NoSlice {
  const weight = sliceWeight(slice);
  return weight.ok ? { ok: true, value: lbPerAcre((value * weight.lb) / 1e6) } : weight;
}

/** At least `digits` figures, thousands with a comma, no trailing zeros. */
export function figures(value: number, digits = 3): string {
  if (value === 0) return '0';
  const decimals = Math.max(0, digits - 1 - Math.floor(Math.log10(Math.abs(value))));
  return value.toLocaleString('en-US', { maximumFractionDigits: Math.min(decimals, 6) });
}

export const formatArea = (area: SquareMetres, prefer: UnitPreference): string =>
  prefer === 'metric' ? `${figures(area)} m²` : `${figures(toSquareFeet(area))} sq ft`;

export function formatDepth(from: Centimetres, to: Centimetres, prefer: UnitPreference): string {
  const ends = prefer === 'metric' ? [from, to] : [toInches(from), toInches(to)];
  return `${ends.map((end) => figures(end, 2)).join('–')} ${prefer === 'metric' ? 'cm' : 'in'}`;
}

export function formatMass(mass: Kilograms, prefer: UnitPreference): string {
  if (prefer === 'customary') return `${figures(toPounds(mass))} lb`;
  return mass < 1 ? `${figures(mass * 1000)} g` : `${figures(mass)} kg`;
}

export const formatRate = (rate: GramsPerM2, prefer: UnitPreference): string =>
  prefer === 'metric' ? `${figures(rate)} g/m²` : `${figures(toLbPer1000SqFt(rate))} lb per 1,000 sq ft`;
