import type { AnalyteKey } from './list';
import table from './methods.json';

/**
 * Methods (extractants, suspensions, buffers). A method changes what a number means, so results are compared only
 * within one method. `spellings` are the words reports use for it; those are listed per analyte because "1:1" beside
 * pH and "1:1" beside EC are two methods.
 */
const LABELS = {
  '1:1_water': '1:1 soil to water',
  '1:2_water': '1:2 soil to water',
  '1:2.5_water': '1:2.5 soil to water',
  '1:5_water': '1:5 soil to water',
  saturated_paste: 'Saturated paste',
  '0.01M_CaCl2': '0.01 M calcium chloride',
  '1M_KCl': '1 M potassium chloride',
  SMP: 'Shoemaker-McLean-Pratt buffer',
  Sikora: 'Sikora buffer',
  Mehlich_buffer: 'Mehlich buffer',
  modified_Mehlich: 'Modified Mehlich buffer',
  Adams_Evans: 'Adams-Evans buffer',
  Moore_Sikora: 'Moore-Sikora buffer',
  Woodruff: 'Woodruff buffer',
  modified_Woodruff: 'Modified Woodruff buffer',
  unnamed: 'Method not named',
  LTI: 'Buffer pH times ten',
  from_buffer: 'From buffer pH',
  BaCl2_TEA: 'Barium chloride-TEA, pH 8.2',
  Woodruff_NA: 'Woodruff neutralizable acidity',
  qualitative: 'Fizz test',
  quantitative: 'Carbonate by gas or titration',
  LOI: 'Loss on ignition',
  Walkley_Black: 'Walkley-Black',
  WB: 'Walkley-Black',
  combustion: 'Dry combustion',
  NIR: 'Near infrared',
  NaOH_DTPA: 'NaOH-DTPA extract',
  calculated: 'Calculated',
  calc: 'Calculated',
  any: 'Any method',
  Kjeldahl: 'Kjeldahl',
  KCl: 'Potassium chloride',
  CaSO4: 'Calcium sulfate',
  CaCl2: '0.01 M calcium chloride',
  water: 'Water extract',
  H3A: 'H3A (weak organic acids)',
  sum: 'Sum',
  Bray1: 'Bray P1 (weak)',
  Bray2: 'Bray P2 (strong)',
  Olsen: 'Olsen (bicarbonate)',
  M3: 'Mehlich-3',
  M3_ICP: 'Mehlich-3, ICP',
  M3_color: 'Mehlich-3, colorimetric',
  M1: 'Mehlich-1',
  Morgan: 'Morgan',
  mod_Morgan: 'Modified Morgan',
  AB_DTPA: 'AB-DTPA',
  Colwell: 'Colwell',
  CAL: 'Calcium acetate lactate',
  AL: 'Ammonium lactate',
  resin: 'Ion exchange resin',
  acetic: 'Acetic acid',
  total: 'Total (acid digest)',
  index: 'Laboratory index',
  PBI: 'Phosphorus buffering index',
  NH4OAc: 'Ammonium acetate',
  NH4NO3: 'Ammonium nitrate',
  NaHCO3: 'Bicarbonate',
  sat_paste: 'Saturated paste extract',
  moist: 'Field-moist',
  MCP: 'Monocalcium phosphate',
  KCl40: 'KCl-40',
  DTPA: 'DTPA',
  HCl: '0.1 N hydrochloric acid',
  H3PO4: 'Phosphoric acid',
  hot_water: 'Hot water',
  DTPA_Sorbitol: 'DTPA-sorbitol',
  oxalate: 'Acid ammonium oxalate',
  summation: 'Sum of cations',
  NH4OAc_pH7: 'Ammonium saturation, pH 7',
  effective: 'Effective (bases plus KCl acidity)',
  NaOAc: 'Sodium acetate, pH 8.2',
  of_CEC: 'Share of CEC',
  of_bases: 'Share of bases',
  meq: 'By charge',
  ppm: 'By mass',
  Na_over_CEC: 'Sodium over CEC',
  from_SAR: 'From SAR',
  sat_extract: 'Saturation extract',
  '1:1': '1:1 soil to water',
  '1:2': '1:2 soil to water',
  '1:2.5': '1:2.5 soil to water',
  '1:5': '1:5 soil to water',
  from_ec: 'From conductivity',
  hydrometer: 'Hydrometer or pipette',
  class: 'Class',
  scoop: 'Scoop',
  core: 'Core',
  gravimetric: 'Oven drying',
  paste: 'Saturated paste',
  '24h': '24-hour burst',
  KMnO4: 'Permanganate',
  autoclaved: 'Autoclaved citrate',
  wet: 'Rain simulator',
  'Ca(OH)2': 'Single addition of lime water',
} as const;

export type MethodKey = keyof typeof LABELS;

export type AnalyteMethod = {
  readonly key: MethodKey;
  readonly label: string;
  readonly spellings: readonly string[];
  /** Lowest and highest value that is worth believing without a question, in `plausibleUnit`; null for words. */
  readonly plausible: readonly [number, number] | null;
  readonly plausibleUnit: string;
  readonly source: string;
};

type Method = {
  readonly key: MethodKey;
  readonly label: string;
  readonly spellings: readonly string[];
  readonly analytes: readonly AnalyteKey[];
};

export function isMethodKey(text: string): text is MethodKey {
  return Object.hasOwn(LABELS, text);
}

/** The words for a method, for people. */
export function methodLabel(key: MethodKey): string {
  return LABELS[key];
}

/** The methods known for one analyte, most usual first. */
export function methodsOf(key: AnalyteKey): readonly AnalyteMethod[] {
  return BY_ANALYTE.get(key) ?? [];
}

function pair(range: readonly number[] | null): readonly [number, number] | null {
  const [low, high] = range ?? [];
  return low === undefined || high === undefined ? null : [low, high];
}

function build(): ReadonlyMap<AnalyteKey, readonly AnalyteMethod[]> {
  const map = new Map<AnalyteKey, readonly AnalyteMethod[]>();
  for (const key of Object.keys(table)) {
    if (!isTableKey(key)) continue;
    const list: AnalyteMethod[] = [];
    for (const row of table[key]) {
      if (!isMethodKey(row.key)) throw new Error(`Method ${row.key} of ${key} has no label.`);
      list.push({ ...row, key: row.key, label: LABELS[row.key], plausible: pair(row.plausible) });
    }
    map.set(key, list);
  }
  return map;
}

function isTableKey(key: string): key is keyof typeof table {
  return Object.hasOwn(table, key);
}

const BY_ANALYTE = build();

function collect(): readonly Method[] {
  const found = new Map<MethodKey, { spellings: Set<string>; analytes: AnalyteKey[] }>();
  for (const [analyte, methods] of BY_ANALYTE) {
    for (const method of methods) {
      const entry = found.get(method.key) ?? { spellings: new Set<string>(), analytes: [] };
      for (const spelling of method.spellings) entry.spellings.add(spelling);
      entry.analytes.push(analyte);
      found.set(method.key, entry);
    }
  }
  return [...found].map(([key, entry]) => ({
    key,
    label: LABELS[key],
    spellings: [...entry.spellings],
    analytes: entry.analytes,
  }));
}

/** Every method once, with the analytes it is used for. */
export const METHODS: readonly Method[] = collect();
