import type { SamplePart } from '../candidate';

const OTHERS: readonly (readonly [string, RegExp])[] = [
  ['a plant tissue test', /\b(plant|foliar|leaf|leaves|petioles?|tissues?|forage|hay|silage|feed)\b/i],
  ['a water test', /\b(water|irrigation|well|effluent|wastewater)\b/i],
  ['a compost or manure test', /\b(composts?|manures?|biosolids?|digestate|slurry|sludge)\b/i],
  ['a fertiliser analysis', /\b(fertili[sz]ers?)\b/i],
];

const TITLES: readonly (readonly [string, RegExp])[] = [
  [
    'a plant tissue test',
    /\b(plant (tissue|analys[ei]s)|tissue (test|analys[ei]s|report|results?|nutrient)|leaf (analys[ei]s|tissue|test|nutrient)|petiole|foliar|forage (analys[ei]s|test))\b/i,
  ],
  [
    'a water test',
    /\b((irrigation|well|drinking|surface|pond|ground)?\s*water (analys[ei]s|test|tests|quality|report|results?|suitability|sample))\b|\b(irrigation|drinking|well) water\b/i,
  ],
  [
    'a compost or manure test',
    /\b(compost|manure|biosolids|digestate|slurry) (analys[ei]s|test|report|maturity|quality|results?)\b/i,
  ],
  ['a fertiliser analysis', /\bfertili[sz]er (analys[ei]s|guarantee|solution analys[ei]s|test report)\b/i],
];

const SOIL = /\bsoils?\b(?! (laborator|lab\b|labs\b|service|testing (lab|serv|cent)|and |& |science))/i;

/** What a "sample type" cell says when it is not soil; null for soil and for words that say neither. */
export function otherMaterial(text: string): string | null {
  if (/\bsoil\b/i.test(text)) return null;
  return OTHERS.find(([, pattern]) => pattern.test(text))?.[0] ?? null;
}

/** What titles and headings say the file is about when it is not soil. */
export function materialOf(texts: readonly string[]): string | null {
  const all = texts.join(' | ');
  if (SOIL.test(all.replace(/soil (testing )?(service|laborator\w*|lab|labs)\b/gi, ' '))) return null;
  return TITLES.find(([, pattern]) => pattern.test(all))?.[0] ?? null;
}

/**
 * Numbers can say it too: phosphorus in per cent is a plant's or a compost's, never a soil's. Asked only where nothing
 * in words says soil.
 */
export function materialByNumbers(parts: readonly SamplePart[]): string | null {
  const all = parts.flatMap((part) => part.candidates);
  const phosphorus = all.filter((one) => one.label.analyte === 'phosphorus' && one.unit === '%');
  if (phosphorus.length === 0) return null;
  const other = all.filter((one) => one.label.analyte === 'phosphorus' && one.unit !== '%');
  return other.length > 0 ? null : 'an analysis of plants, compost or fertiliser';
}
