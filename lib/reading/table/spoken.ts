import { type Label, readLabel } from '../labels/label';
import { remembered } from '../labels/remember';

/** Elements as column codes write them in small letters ("ca_ppm"); only inside a heading, never a unit by itself. */
const SYMBOLS: Readonly<Record<string, string>> = {
  ph: 'pH',
  p: 'P',
  k: 'K',
  ca: 'Ca',
  mg: 'Mg',
  na: 'Na',
  s: 'S',
  b: 'B',
  zn: 'Zn',
  mn: 'Mn',
  fe: 'Fe',
  cu: 'Cu',
  al: 'Al',
  h: 'H',
  cl: 'Cl',
  mo: 'Mo',
  om: 'OM',
  som: 'SOM',
  oc: 'OC',
  cec: 'CEC',
  ec: 'EC',
  bph: 'BpH',
  no3: 'NO3',
  nh4: 'NH4',
  so4: 'SO4',
  enr: 'ENR',
  esp: 'ESP',
  sar: 'SAR',
};

/** Units as codes write them, without the strokes that a code cannot hold. */
const UNIT_CODES: readonly (readonly [RegExp, string])[] = [
  [/\b(lbs?|pounds?|#)[ ./]*(?:per )?(?:a|ac|acre)s?\b\.?/gi, 'lb/acre'],
  [/\b(?:[tT](?:ons?)?[ ./]?A[Cc]?(?:re)?|t[ ./]ac(?:re)?)\b/g, 'ton/acre'],
  [/\bkg[ .]*(?:per )?ha(?:-1)?\b/gi, 'kg/ha'],
  [/\bmg[ .]*(?:per )?kg(?:-1)?\b/gi, 'mg/kg'],
  [/\bg[ .]kg\b/gi, 'g/kg'],
  [/\bmg[ .](?:per )?l(?:-1)?\b/gi, 'mg/L'],
  [/\bmg[ .](?:per )?dm3\b/gi, 'mg/dm3'],
  [/\bm(?:illi)?eq?[ ./]*(?:per )?100 ?(?:g|gm|grams?)?\b/gi, 'meq/100g'],
  [/\bcmol\(?[+c]?\)?[ .](?:per )?kg\b/gi, 'cmol/kg'],
  [/\bds[ .]m\b/gi, 'dS/m'],
  [/\bms[ .]cm\b/gi, 'mS/cm'],
  [/\bus[ .]cm\b/gi, 'uS/cm'],
  [/\bmmhos?[ .]cm\b/gi, 'mmho/cm'],
  [/\b(?:pct|prct|perc|percent(?:age)?|per cent)\b\.?/gi, '%'],
  [/\b[tT](?:on(?:ne)?s?)?[ .]ha\b/g, 't/ha'],
  [/\btons?[ .](?:per )?ac(?:re)?\b/gi, 'ton/acre'],
  [/\b(?:lbs?|pounds?|#)[ ./]*(?:per )?1,?000 ?(?:sq\.? ?ft\.?|sqft|sf|ft2|ft²|square feet)/gi, 'lb/1000ft2'],
  [/\b(?:lbs?|pounds?|#)[ ./]*(?:per )?100 ?(?:sq\.? ?ft\.?|sqft|sf|ft2|ft²|square feet)/gi, 'lb/100ft2'],
  [/\bparts per million\b/gi, 'ppm'],
  [/\bmg (?:N|P|K|S|B|Mg|Ca|Na|Zn|Mn|Fe|Cu|CO2-C)\/kg\b/g, 'mg/kg'],
];

/** Column codes are written "P_ppm", "pH.1to1" or "CaSat_pct"; for reading they are words. */
export function spoken(text: string): string {
  return /^[\d.,<>+ -]*$/.test(text) ? text.trim() : inWords(text);
}

const inWords = remembered((text: string): string => {
  let words = text
    .replace(/_(\d)_(\d)\b/g, ' $1:$2')
    .replace(/_/g, ' ')
    .replace(
      /^(?:pct|prct|perc)[ _]?(k|ca|mg|na|h)$/i,
      (_all, name: string) => `${SYMBOLS[name.toLowerCase()] ?? name} saturation %`,
    )
    .replace(/^p([12])$/, 'Bray P$1')
    .replace(/\bsol(?:uble)?[ _.]?salts?\b/gi, 'Soluble salts')
    .replace(/\bhot[ _]?water\b/gi, 'hot water')
    .replace(/(\d) ?to ?(\d)/gi, '$1:$2')
    .replace(/\b(\d) *[:/] *(\d(?:\.\d)?)\b/g, '$1:$2')
    .replace(/\b(p)h\b/gi, 'pH')
    .replace(/([a-z]{3,})pH\b/g, '$1 pH')
    .replace(
      /\bMehlich[\s-]*(\d|I{1,3})(?![\dI])/gi,
      (_all, number: string) => `Mehlich-${/i/i.test(number) ? number.length : number}`,
    )
    .replace(/\bBase[ -]?Sat(?:uration)?\b\.?/gi, 'Base saturation')
    .replace(/\b(K|Ca|Mg|Na|H)[ -]?(?:BS|Sat(?:n|ur)?)\b\.?/gi, '$1 saturation')
    .replace(/\b(?:BS|Sat)[ -](K|Ca|Mg|Na|H)\b/gi, '$1 saturation')
    .replace(/\bOrg(?:anic)?\.? C\b/gi, 'Organic Carbon')
    .replace(/\bBray[ -]?P?[ -]?([12])\b/gi, 'Bray $1')
    .replace(/\b(?:v\/v|w\/v|w:v|v:v)\b/gi, ' ')
    .replace(/\bpH[ -]?Wert\b/gi, 'pH')
    .replace(/\bpH[ -]?Buff?\b\.?|\bBuff?\.?[ -]?pH\b/gi, 'Buffer pH')
    .replace(/\bC[ -]?org\b\.?/g, 'Organic Carbon')
    .replace(/\bKCl[ -]?40\b/gi, 'KCl-40')
    .replace(/\bK[ -]Colwell\b/g, 'Colwell K')
    .replace(/\b(NO3|NH4|SO4)[ -]?([NS])\b/gi, '$1-$2');
  for (const [code, unit] of UNIT_CODES) words = words.replace(code, unit);
  return words.replace(/\s+/g, ' ').trim();
});

const FILL =
  /\b(conc(entration)?|content|reading|res|results?|values?|found|measured|numeric|num|dry basis|db|oven dry|od|ext|extr)\b\.?/gi;

/** "Base saturation Ca" in every order of its words. */
const SHARE = /^(?=.*\bbase sat)(?=.*\b(?:K|Ca|Mg|Na|H|potassium|calcium|magnesium|sodium|hydrogen)\b)/i;
const SHARE_NAME = /\b(K|Ca|Mg|Na|H|potassium|calcium|magnesium|sodium|hydrogen)\b/i;

function shareWords(text: string): string {
  const name = SHARE_NAME.exec(text.replace(/base saturation/i, ' '))?.[1] ?? '';
  return SHARE.test(text) ? `${name} saturation${/%/.test(text) ? ' %' : ''}` : text;
}

function variants(text: string): string[] {
  const words = shareWords(spoken(text));
  const split = words
    .replace(/([a-z]{2,})([A-Z])/g, '$1 $2')
    .replace(/\bP[hH]\b/g, 'pH')
    .replace(/([a-z])pH\b/g, '$1 pH');
  const dashes = split.replace(/(?<!NO3|NH4|SO4|Mehlich)-(?![\d+])/g, ' ');
  const filler = dashes.replace(FILL, ' ').replace(/\s+/g, ' ').trim();
  const small = filler.replace(/\b[a-z]+\d?\b/g, (word) => SYMBOLS[word] ?? word);
  const halves = small.replace(/^(mg|Mg) (?=mg\/|ppm)/, 'Mg ');
  return [...new Set([text, words, split, dashes, filler, small, halves])];
}

/** What a heading of a data file means, codes included. The label keeps the heading's own characters. */
export function labelOf(text: string, captions: readonly string[] = []): Label | null {
  if (text === '' || text.length > 90) return null;
  for (const variant of variants(text)) {
    const label = readLabel(variant, captions);
    if (label !== null) return { ...label, text };
  }
  return null;
}
