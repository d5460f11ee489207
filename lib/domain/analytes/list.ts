/**
 * The analytes Loamline knows, in the fixed order in which grid, chart, export and API show them.
 * A new analyte is one line here, its spellings in spellings.json and its methods in methods.json.
 * `unit` is the usual unit (canonical for charts); `decimals` is how many a laboratory usually prints in that unit.
 */
const ROWS = [
  ['soil_ph_water', 'Soil pH (in water)', 'pH', 'reaction', 'pH', 1],
  ['soil_ph_salt', 'Soil pH (in salt solution)', 'pHs', 'reaction', 'pH', 1],
  ['buffer_ph', 'Buffer pH', 'BpH', 'reaction', 'pH', 2],
  ['lime_index', 'Lime test index', 'LTI', 'reaction', 'index', 0],
  ['exchangeable_acidity', 'Exchangeable acidity', 'H', 'reaction', 'meq/100g', 1],
  ['aluminium', 'Aluminium', 'Al', 'reaction', 'mg/kg', 0],
  ['al_saturation', 'Aluminium saturation', 'Al%', 'reaction', '%', 1],
  ['lime_requirement', 'Lime requirement', 'LR', 'reaction', 't/ha', 1],
  ['lime_buffer_capacity', 'Lime buffer capacity', 'LBC', 'reaction', 'mg CaCO3/kg/pH', 0],
  ['carbonate', 'Free lime (carbonate)', 'CaCO3', 'reaction', 'class', 1],
  ['organic_matter', 'Organic matter', 'OM', 'organic', '%', 1],
  ['organic_carbon', 'Organic carbon', 'OC', 'organic', '%', 2],
  ['total_carbon', 'Total carbon', 'TC', 'organic', '%', 2],
  ['humic_matter', 'Humic matter', 'HM', 'organic', '%', 2],
  ['active_carbon', 'Active carbon', 'POXC', 'organic', 'mg/kg', 0],
  ['respiration', 'Respiration', 'CO2', 'organic', 'mg/kg', 0],
  ['ace_protein', 'Soil protein', 'ACE', 'organic', 'mg/g', 1],
  ['wdp', 'Water-extractable organic carbon', 'WEOC', 'organic', 'mg/kg', 0],
  ['weon', 'Water-extractable organic nitrogen', 'WEON', 'organic', 'mg/kg', 1],
  ['cn_ratio', 'Carbon to nitrogen ratio', 'C:N', 'organic', 'ratio', 1],
  ['enr', 'Estimated nitrogen release', 'ENR', 'nitrogen', 'kg/ha', 0],
  ['total_n', 'Total nitrogen', 'N', 'nitrogen', '%', 2],
  ['nitrate_n', 'Nitrate nitrogen', 'NO3-N', 'nitrogen', 'mg/kg', 0],
  ['ammonium_n', 'Ammonium nitrogen', 'NH4-N', 'nitrogen', 'mg/kg', 1],
  ['mineral_n', 'Mineral nitrogen', 'Nmin', 'nitrogen', 'mg/kg', 0],
  ['phosphorus', 'Phosphorus', 'P', 'nutrients', 'mg/kg', 0],
  ['p_saturation', 'Phosphorus saturation', 'PSR', 'nutrients', '%', 1],
  ['pbi', 'Phosphorus buffering', 'PBI', 'nutrients', 'index', 0],
  ['potassium', 'Potassium', 'K', 'nutrients', 'mg/kg', 0],
  ['calcium', 'Calcium', 'Ca', 'nutrients', 'mg/kg', 0],
  ['magnesium', 'Magnesium', 'Mg', 'nutrients', 'mg/kg', 0],
  ['sulfur', 'Sulfur', 'S', 'nutrients', 'mg/kg', 0],
  ['sodium', 'Sodium', 'Na', 'nutrients', 'mg/kg', 0],
  ['boron', 'Boron', 'B', 'micronutrients', 'mg/kg', 1],
  ['zinc', 'Zinc', 'Zn', 'micronutrients', 'mg/kg', 1],
  ['manganese', 'Manganese', 'Mn', 'micronutrients', 'mg/kg', 0],
  ['iron', 'Iron', 'Fe', 'micronutrients', 'mg/kg', 0],
  ['copper', 'Copper', 'Cu', 'micronutrients', 'mg/kg', 1],
  ['molybdenum', 'Molybdenum', 'Mo', 'micronutrients', 'mg/kg', 2],
  ['chloride', 'Chloride', 'Cl', 'micronutrients', 'mg/kg', 0],
  ['silicon', 'Silicon', 'Si', 'micronutrients', 'mg/kg', 0],
  ['cobalt', 'Cobalt', 'Co', 'micronutrients', 'mg/kg', 2],
  ['selenium', 'Selenium', 'Se', 'micronutrients', 'mg/kg', 2],
  ['nickel', 'Nickel', 'Ni', 'metals', 'mg/kg', 1],
  ['lead', 'Lead', 'Pb', 'metals', 'mg/kg', 0],
  ['cadmium', 'Cadmium', 'Cd', 'metals', 'mg/kg', 2],
  ['chromium', 'Chromium', 'Cr', 'metals', 'mg/kg', 1],
  ['arsenic', 'Arsenic', 'As', 'metals', 'mg/kg', 1],
  ['mercury', 'Mercury', 'Hg', 'metals', 'mg/kg', 2],
  ['cec', 'Cation exchange capacity', 'CEC', 'exchange', 'meq/100g', 1],
  ['sum_of_bases', 'Sum of bases', 'SB', 'exchange', 'meq/100g', 1],
  ['base_saturation', 'Base saturation', 'BS', 'exchange', '%', 0],
  ['sat_k', 'Potassium, share of CEC', 'K%', 'exchange', '%', 1],
  ['sat_ca', 'Calcium, share of CEC', 'Ca%', 'exchange', '%', 1],
  ['sat_mg', 'Magnesium, share of CEC', 'Mg%', 'exchange', '%', 1],
  ['sat_na', 'Sodium, share of CEC', 'Na%', 'exchange', '%', 1],
  ['sat_h', 'Hydrogen, share of CEC', 'H%', 'exchange', '%', 1],
  ['other_bases', 'Other bases', 'OB', 'exchange', '%', 1],
  ['ratio_ca_mg', 'Calcium to magnesium ratio', 'Ca:Mg', 'exchange', 'ratio', 1],
  ['ratio_k_mg', 'Potassium to magnesium ratio', 'K:Mg', 'exchange', 'ratio', 2],
  ['ratio_mg_k', 'Magnesium to potassium ratio', 'Mg:K', 'exchange', 'ratio', 1],
  ['ratio_ca_k', 'Calcium to potassium ratio', 'Ca:K', 'exchange', 'ratio', 1],
  ['ratio_p_zn', 'Phosphorus to zinc ratio', 'P:Zn', 'exchange', 'ratio', 1],
  ['ec', 'Salts (electrical conductivity)', 'EC', 'salts', 'dS/m', 2],
  ['tss', 'Total soluble salts', 'TSS', 'salts', 'mg/kg', 0],
  ['esp', 'Exchangeable sodium percentage', 'ESP', 'salts', '%', 1],
  ['sar', 'Sodium adsorption ratio', 'SAR', 'salts', 'ratio', 1],
  ['bicarbonate', 'Bicarbonate', 'HCO3', 'salts', 'mg/L', 0],
  ['gypsum_requirement', 'Gypsum requirement', 'GR', 'salts', 't/ha', 1],
  ['sand', 'Sand', 'Sand', 'physical', '%', 0],
  ['silt', 'Silt', 'Silt', 'physical', '%', 0],
  ['clay', 'Clay', 'Clay', 'physical', '%', 0],
  ['texture_class', 'Texture', 'texture', 'physical', 'class', 0],
  ['density', 'Density', 'density', 'physical', 'g/cm3', 2],
  ['moisture', 'Moisture', 'moist', 'physical', '%', 1],
  ['saturation_percentage', 'Saturation percentage', 'SP', 'physical', '%', 0],
  ['aggregate_stability', 'Aggregate stability', 'WAS', 'physical', '%', 0],
] as const;

export type AnalyteKey = (typeof ROWS)[number][0];
export type AnalyteGroup = (typeof ROWS)[number][3];

/** Words over a block of analytes in the grid, in the order of the blocks. */
export const ANALYTE_GROUPS: readonly { readonly key: AnalyteGroup; readonly label: string }[] = [
  { key: 'reaction', label: 'Soil reaction' },
  { key: 'organic', label: 'Organic matter and life' },
  { key: 'nitrogen', label: 'Nitrogen' },
  { key: 'nutrients', label: 'Major nutrients' },
  { key: 'micronutrients', label: 'Micronutrients' },
  { key: 'metals', label: 'Metals' },
  { key: 'exchange', label: 'Exchange capacity and balance' },
  { key: 'salts', label: 'Salts' },
  { key: 'physical', label: 'Physical' },
];

export const ANALYTE_ROWS = ROWS;

/** Every analyte key, in display order. */
export const ANALYTE_KEYS: readonly AnalyteKey[] = ROWS.map((row) => row[0]);

const KEY_SET: ReadonlySet<string> = new Set(ANALYTE_KEYS);

/** True when the text is one of the registry's keys. */
export function isAnalyteKey(text: string): text is AnalyteKey {
  return KEY_SET.has(text);
}
