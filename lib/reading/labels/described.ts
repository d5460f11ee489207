import { normal } from './normal';

/** Words that say how an analyte was extracted, measured or counted, never which analyte it is. */
const DESCRIBES = new Set(
  `a aas aes air airdry also and aqua as at available avail bases basis bicarbonate bray buffer by calculated cations
  cdta citrate colorimetric colour color combustion conductivity content concentration cold corrected determined dilute
  dried dry dtpa dumas edta electrode equivalent est estimated exchange exchangeable exch expressed extr extract
  extractable extracted extraction extracts extractant fine fraction fresh from gravimetric h3a has hot hydrometer icp
  ignition in index is laboratory level loi loss m3 measured mehlich mehlich-1 mehlich-3 method mod modified moist moisture ms murphy
  morgan nutrient oes of olsen on organic oven paste percent percentage plant probe procedure ratio-free readily reading
  reserve residual result riley sample sampling saturated scale share soil sol soluble solution spectro sum summation
  suspension test the titration to topsoil total turbidimetric units using value volume water weight wet with walkley
  black walkley-black strong weak acid-extractable water-soluble plant-available acetate ammonium nh4oac nh4cl kcl cacl2 bacl2 hcl hcl-extractable
  nahco3 al cal p1 p2 i ii iii 1 2 3 dry-ash h2o water-extractable mineral element elemental reserve active potential
  one part parts five two half equal used lime requirement guide binding held that is complex sikora smp woodruff adams
  evans adams-evans sand fresh standard routine your analysed analyzed tested acid-soluble per unit cec acidity screening regia capacity cation cations ph saturation ammonium share natural acid edta-extractable nitric perchloric
  digest digestion saturate slurry solids deionised deionized distilled`
    .split(/\s+/)
    .filter((word) => word !== ''),
);

const MOLAR = /^(\d+(\.\d+)?)?-?[mn]$|^\d+(\.\d+)?$|^\d+(\.\d+)?:\d+(\.\d+)?$|^n$/;
/** "Potassium (K) exchangeable": the symbol beside its own name. */
const SYMBOLS: Readonly<Record<string, string>> = {
  p: 'phosphorus',
  k: 'potassium',
  s: 'sulfur',
  b: 'boron',
  ca: 'calcium',
  mg: 'magnesium',
  na: 'sodium',
  zn: 'zinc',
  mn: 'manganese',
  fe: 'iron',
  cu: 'copper',
  al: 'aluminum',
  h: 'hydrogen',
  t: 'exchange capacity',
  ph: 'soil acidity',
};

/** A second nutrient may stand in a label as its extractant: "calcium chloride", "sodium bicarbonate". */
const SALTS =
  /\b(0?\.?\d* ?m )?(calcium|ammonium|potassium|barium|sodium|magnesium|lithium) (chloride|acetate|nitrate|bicarbonate|sulfate|sulphate|lactate|oxalate|fluoride|citrate|phosphate)s?\b/g;
const LEADS = new Set(
  'acidity of the soil measured determined hot water dtpa available extractable exchangeable soluble plant-available total soil residual readily plant test mehlich olsen active estimated water-soluble reaction exch avail extr acid-extractable mineral'.split(
    ' ',
  ),
);

function leads(word: string): boolean {
  return LEADS.has(word) || /-(extractable|soluble|available|exchangeable)$/.test(word);
}

/** True when every word only says how something was extracted, measured or counted. */
export function onlyDescribes(text: string): boolean {
  const words = normal(text.replace(/[/–—]/g, ' '))
    .replace(SALTS, ' ')
    .split(' ')
    .filter((word) => word !== '');
  return words.length > 0 && words.every((word) => DESCRIBES.has(word) || MOLAR.test(word));
}

/**
 * The name at the head of a long label whose other words only describe: "Phosphorus extractable with bicarbonate
 * (Olsen)". `find` answers for a normal form. Null when any other word could change the meaning.
 */
export function describedName<T>(text: string, find: (plain: string) => T | null): T | null {
  const plain = normal(text.replace(/[/–—]/g, ' ')).replace(SALTS, ' ');
  const words = plain.split(' ').filter((word) => word !== '');
  if (words.length < 2 || words.length > 14) return null;
  let from = 0;
  while (from < words.length - 1 && leads(words[from] ?? '')) from += 1;
  for (let start = from; start >= 0; start--) {
    for (let to = Math.min(words.length, start + 5); to > start; to--) {
      const name = words.slice(start, to).join(' ');
      const found = find(name);
      if (found === null) continue;
      const rest = words.slice(to);
      const described = rest.every((word) => DESCRIBES.has(word) || MOLAR.test(word) || SYMBOLS[word] === name);
      return described ? found : null;
    }
  }
  return null;
}
