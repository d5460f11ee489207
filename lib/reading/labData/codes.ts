import type { AnalyteKey, MethodKey, UnitKey } from '@/lib/domain/analytes';

type Meaning = { readonly analyte: AnalyteKey; readonly method: MethodKey | null };

/**
 * What the open standard's test codes say of analyte and method, for the codes met most. They say nothing of the unit:
 * that is taken from the file. A code that is not here is no fault; the element's own name then counts.
 */
const FIRST: readonly (readonly [RegExp, Meaning])[] = [
  [/^S-PH-1:1\./, { analyte: 'soil_ph_water', method: '1:1_water' }],
  [/^S-PH-1:2\.(?!5)/, { analyte: 'soil_ph_water', method: '1:2_water' }],
  [/^S-BPH-SIK/, { analyte: 'buffer_ph', method: 'Sikora' }],
  [/^S-SOM-LOI/, { analyte: 'organic_matter', method: 'LOI' }],
  [/^S-P-M3/, { analyte: 'phosphorus', method: 'M3_ICP' }],
  [/^S-P-BIC/, { analyte: 'phosphorus', method: 'Olsen' }],
  [/^S-P-B1/, { analyte: 'phosphorus', method: 'Bray1' }],
  [/^S-P-MMOR/, { analyte: 'phosphorus', method: 'mod_Morgan' }],
  [/^S-K-M3/, { analyte: 'potassium', method: 'M3' }],
  [/^S-CA-M3/, { analyte: 'calcium', method: 'M3' }],
  [/^S-MG-M3/, { analyte: 'magnesium', method: 'M3' }],
  [/^S-S-M3/, { analyte: 'sulfur', method: 'M3' }],
  [/^S-ZN-DTPA/, { analyte: 'zinc', method: 'DTPA' }],
  [/^S-ZN-M3/, { analyte: 'zinc', method: 'M3' }],
  [/^S-B-M3/, { analyte: 'boron', method: 'M3' }],
  [/^S-CEC\./, { analyte: 'cec', method: 'summation' }],
  [/^S-BS-CA/, { analyte: 'sat_ca', method: null }],
  [/^S-BS-H/, { analyte: 'sat_h', method: null }],
];

const SECOND: Readonly<Record<string, Meaning>> = {
  PH_005: { analyte: 'soil_ph_water', method: '1:1_water' },
  PH_006: { analyte: 'soil_ph_water', method: '1:2_water' },
  BPH_007: { analyte: 'buffer_ph', method: 'Sikora' },
  OM_004: { analyte: 'organic_matter', method: 'LOI' },
  P_033: { analyte: 'phosphorus', method: 'M3_ICP' },
  P_045: { analyte: 'phosphorus', method: 'Olsen' },
  P_004: { analyte: 'phosphorus', method: 'Bray1' },
  P_036: { analyte: 'phosphorus', method: 'mod_Morgan' },
  K_031: { analyte: 'potassium', method: 'M3' },
  CA_021: { analyte: 'calcium', method: 'M3' },
  MG_022: { analyte: 'magnesium', method: 'M3' },
  S_026: { analyte: 'sulfur', method: 'M3' },
  ZN_002: { analyte: 'zinc', method: 'DTPA' },
  ZN_015: { analyte: 'zinc', method: 'M3' },
  B_017: { analyte: 'boron', method: 'M3' },
  CEC_008: { analyte: 'cec', method: 'summation' },
  CABS_001: { analyte: 'sat_ca', method: null },
  HBS_001: { analyte: 'sat_h', method: null },
};

export function meaningOfCode(code: string): Meaning | null {
  const second = /^L_MODV2_SOIL_([A-Z0-9]+_\d{3})$/i.exec(code)?.[1]?.toUpperCase();
  if (second !== undefined) return SECOND[second] ?? null;
  return FIRST.find(([pattern]) => pattern.test(code.toUpperCase()))?.[1] ?? null;
}

/** Units in the code of units for computers (UCUM) and as such files write them beside it. */
const UCUM: Readonly<Record<string, UnitKey>> = {
  '[ppm]': 'mg/kg',
  'mg/kg': 'mg/kg',
  'ug/g': 'mg/kg',
  'mg/L': 'mg/L',
  'mg/dm3': 'mg/dm3',
  'g/kg': 'g/kg',
  'meq/(100.g)': 'meq/100g',
  'meq/(100.g1)': 'meq/100g',
  'cmol/kg': 'meq/100g',
  'meq/L': 'meq/L',
  '%': '%',
  'dS/m': 'dS/m',
  'mmho/cm': 'dS/m',
  'mS/cm': 'dS/m',
  'uS/cm': 'uS/cm',
  '[pH]': 'pH',
  '[lb_av]/[acr_us]': 'lb/acre',
  '[lb_av]/[acr_br]': 'lb/acre',
  '[lb_av]/(1000.[sft_i])': 'lb/1000ft2',
  '[ston_av]/[acr_us]': 'ton/acre',
  't/har': 't/ha',
  'kg/har': 'kg/ha',
  'g/cm3': 'g/cm3',
};

export function ucumUnit(text: string): UnitKey | null {
  return UCUM[text.trim()] ?? null;
}
