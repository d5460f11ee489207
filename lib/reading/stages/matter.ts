import type { CellLine } from './cells';

/** What a page can be about when it is not soil, with the words that say so. */
const KINDS: readonly {
  readonly name: string;
  readonly title: RegExp;
  readonly weak?: RegExp;
  /** A word with which enough of the others tell the kind without a title. */
  readonly alone?: RegExp;
  readonly words: readonly RegExp[];
}[] = [
  {
    name: 'a plant tissue test',
    title:
      /\b(plant (tissue|analysis|test)|tissue (test|analysis|report)|leaf (analysis|tissue|test|blade)|leaves|petioles?|foliar|sap analysis|needle analysis)\b/i,
    words: [
      /\b(dry matter|dry weight|dry basis)\b/i,
      /\b(petiole|leaf|leaves|blade|tissue|foliar)\b/i,
      /\b(growth stage|plant part|sufficiency range|most recent(ly)? (mature|matured))\b/i,
    ],
  },
  {
    name: 'a water test',
    title:
      /\b((irrigation|well|drinking|pond|surface|tap|ground)[ -]?water|water (analysis|test|quality|report|suitability|sample))\b/i,
    words: [
      /\b(hardness|alkalinity)\b/i,
      /\b(SAR|sodium adsorption ratio|adjusted SAR)\b/i,
      /\b(TDS|total dissolved solids)\b/i,
      /\b(well|pond|stream|borehole|reservoir|irrigat\w+)\b/i,
      /\bresidual sodium carbonate\b/i,
      /\b(bicarbonate|HCO3)\b/i,
      /\bchlorides?\b/i,
    ],
    alone: /\bwater\b/i,
  },
  {
    name: 'a compost or manure test',
    weak: /\b(compost|manure|digestate|slurry)\b/i,
    title:
      /\b(compost|manure|biosolids?|digestate|slurry|vermicompost|worm castings?)\b.{0,24}\b(analysis|test|report|sample|quality)\b|\b(analysis|test) of (compost|manure)/i,
    words: [
      /\bas[- ](received|is)\b/i,
      /\b(dry matter|dry weight|dry basis)\b/i,
      /\b(maturity|stability|respiration rate|feedstock|windrow)\b/i,
      /\blbs?\/ton\b|\bkg\/t\b|\bper ton of (manure|compost)\b/i,
      /\b(compost|manure)\b/i,
    ],
  },
  {
    name: 'a fertiliser or nutrient solution analysis',
    title:
      /\b(fertili[sz]er|nutrient|feed|stock) solutions?\b|\bfertili[sz]er (analysis|test|label)|\bguaranteed analysis\b|\bhydroponic\b/i,
    words: [/\b(feed tank|drip|dripper|stock tank|injector|recipe)\b/i, /\bguaranteed\b/i, /\bmmol\/l\b/i],
  },
  {
    name: 'a potting mix test',
    title:
      /\b(potting|soilless|container|greenhouse|growing|rooting)[ -](mix|media|medium|substrate)\b|\bsubstrate (analysis|test)\b|\bsaturated media extract\b|\bpeat (mix|substrate)\b/i,
    words: [
      /\b(saturated media|SME|1:1\.5 extract|pour[- ]?through)\b/i,
      /\b(potting|soilless|media|substrate|peat|perlite|coir)\b/i,
    ],
  },
];

/** Words of a soil report; "Soil Testing Service" is a laboratory's name and says nothing. */
export const SOIL_WORDS =
  /\bsoil (test|analysis|analyses|report|sample|fertility|audit|examination|results?)s?\b(?! (laborator|lab|service|cent|desk|clinic|office))/i;

const SOIL_SIGNS: readonly RegExp[] = [
  /\bbuffer (pH|index)\b|\bpH buffer\b|\bBpH\b/i,
  /\b(CEC|exchange capacity)\b/i,
  /\b(base|calcium|magnesium|potassium|Ca|Mg|K) sat/i,
  /\b(Mehlich|Bray|Olsen|Morgan|Colwell|DTPA)\b/i,
  /\bsoil (pH|texture|type|class|depth|reaction)\b/i,
  /\b(lime requirement|organic matter)\b/i,
  /\b(sampling|sample|core) depth\b|\b0 ?[-–] ?\d{1,2} ?(in|cm|")/i,
];

/** A word in passing ("Compost corner" as a plot's name) does not make a page. */
const LEAST = 4;

/**
 * What a page is when it is not about soil, weighed from its titles, its "sample type" and its words; null for soil.
 * A laboratory's own name ("… Soil Laboratory") is no evidence, and neither is a remark ("have the soil tested").
 */
export function notSoil(lines: readonly CellLine[]): string | null {
  const cells = lines.flatMap((line) => line.cells);
  if (cells.length === 0) return null;
  const sizes = cells.map((cell) => cell.phrase.size).sort((a, b) => a - b);
  const usual = sizes[Math.floor(sizes.length / 2)] ?? 10;
  const page = lines[0]?.line.page;
  const top = (page?.height ?? 0) * 0.4;
  const isSentence = (cell: (typeof cells)[number]) => cell.phrase.words.length >= 5 && cell.phrase.text.endsWith('.');
  const isTitle = (cell: (typeof cells)[number]) =>
    (cell.phrase.size > 1.12 * usual || cell.phrase.y0 < top) && !isSentence(cell);
  const typed = cells.filter((cell) => /^(sample type|matrix|material( type)?):/i.test(cell.phrase.text));
  const titles = cells.filter(isTitle).map((cell) => cell.phrase.text.split(' ').slice(0, 9).join(' '));
  const all = cells.map((cell) => cell.phrase.text).join(' | ');
  const soilTitle = titles.some((text) => SOIL_WORDS.test(text)) ? 4 : 0;
  const soilType = typed.some((cell) => /\bsoil\b/i.test(cell.phrase.text)) ? 5 : 0;
  const soil = soilTitle + soilType + Math.min(4, SOIL_SIGNS.filter((sign) => sign.test(all)).length);
  let best: { name: string; weight: number } | null = null;
  for (const kind of KINDS) {
    const weak =
      kind.weak !== undefined &&
      titles.some((text) => kind.weak?.test(text)) &&
      kind.words.filter((word) => word.test(all)).length >= 3
        ? 1.5
        : 0;
    const title = titles.some((text) => kind.title.test(text)) ? 4 : weak;
    const type = typed.some(
      (cell) => kind.title.test(cell.phrase.text) || kind.words.some((word) => word.test(cell.phrase.text)),
    )
      ? 3
      : 0;
    const told = kind.words.filter((word) => word.test(all)).length;
    // Without a title the numbers speak: hardness, bicarbonate and chloride side by side are those of a water.
    if (title + type === 0 && (kind.alone === undefined || told < 4 || !kind.alone.test(all))) continue;
    const weight = title + type + 1.5 * told;
    if (best === null || weight > best.weight) best = { name: kind.name, weight };
  }
  return best !== null && best.weight >= LEAST && best.weight > soil ? best.name : null;
}
