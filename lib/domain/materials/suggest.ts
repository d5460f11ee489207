import type { AnalyteKey } from '../analytes';
import { ppmGain } from '../effects/soil-mass';
import { citation, type Source } from '../sources';
import { type Inches, type Kilograms, type SquareMetres, toPounds, toSquareFeet } from '../units';
import type { Material } from './types';

/**
 * What an amount of a material is meant to do once it has all acted, as a range between published figures that disagree.
 *
 * pH: change = amount per 1,000 sq ft / amount for one unit of pH (that figure holds for 6 in; another depth scales it). For sulfur
 * the small figure is 10, 15, 20 lb of sulfur on light, medium, heavy soil (eXtension for light and heavy; a gardening page
 * for medium) and the large one 27.6 to 55.3 lb (Royal Horticultural Society, 135 to 270 g/m2, sand to clay; medium is our
 * middle). For ground limestone 35, 50, 70 lb and 60, 80, 105 lb, both from pages without an accountable author.
 * Nutrients: ppm = lb x element x share found again x 10^6 / lb of soil, at 1.3 g/cm3 (assumption); shares found again from the
 * tri-state build-up figures as an Ohio extension writer quotes them (K 0.24 to 0.40), for P 0.1 to 0.5 (assumption).
 * The middle of a range is the geometric one. Errors: no rule for the material, texture or depth missing, free lime in the soil.
 * Worked example: 10 lb of 90 % sulfur per 1,000 sq ft of light soil, 6 in: -0.33 to -0.90, middle -0.54.
 */
export type Texture = 'light' | 'medium' | 'heavy';

export type Suggestion = {
  readonly analyte: AnalyteKey;
  readonly unit: string;
  /** Signed, reaction complete; `low` is the smaller change. */
  readonly likely: number;
  readonly low: number;
  readonly high: number;
  readonly source: string;
  readonly weakSource: boolean;
};

export type SuggestRefusal = 'no-published-rule' | 'texture-missing' | 'depth-missing' | 'free-lime';

const GARDEN_PAGE: Source = { publisher: 'A gardening page', title: 'Changing soil pH', status: 'weak' };
const EXTENSION: Source = {
  publisher: 'eXtension',
  title: 'Soil pH for Blueberry Plantings',
  year: 2010,
  status: 'published',
};
const RHS: Source = { publisher: 'Royal Horticultural Society', title: 'Acidifying soil', status: 'published' };
const LIME_TABLE: Source = { publisher: 'A gardening page', title: 'Raising pH with Limestone', status: 'weak' };
const TRI_STATE: Source = {
  publisher: 'Tri-state build-up figures',
  title: 'How much fertilizer will move soil test levels',
  year: 2012,
  status: 'quoted',
};

type Needs = { readonly small: number; readonly large: number; readonly sources: readonly Source[] };

/** lb of sulfur, or of ground limestone, for one unit of pH on 1,000 sq ft, 6 in deep. */
const SULFUR: Readonly<Record<Texture, Needs>> = {
  light: { small: 10, large: 27.65, sources: [EXTENSION, RHS] },
  medium: { small: 15, large: 41.48, sources: [GARDEN_PAGE, RHS] },
  heavy: { small: 20, large: 55.3, sources: [EXTENSION, RHS] },
};
const LIMESTONE: Readonly<Record<Texture, Needs>> = {
  light: { small: 35, large: 60, sources: [GARDEN_PAGE, LIME_TABLE] },
  medium: { small: 50, large: 80, sources: [GARDEN_PAGE, LIME_TABLE] },
  heavy: { small: 70, large: 105, sources: [GARDEN_PAGE, LIME_TABLE] },
};
const LIMESTONE_CCE = 95;
const TABLE_DEPTH_IN = 6;
const DENSITY = 1.3;
const FOUND_AGAIN = {
  K2O: { small: 0.24, large: 0.4, element: 0.8301 },
  P2O5: { small: 0.1, large: 0.5, element: 0.4364 },
} as const;

const range = (
  analyte: AnalyteKey,
  unit: string,
  sign: 1 | -1,
  small: number,
  large: number,
  sources: readonly Source[],
): Suggestion => ({
  analyte,
  unit,
  likely: sign * Math.sqrt(small * large),
  low: sign * small,
  high: sign * large,
  source: sources.map(citation).join('; '),
  weakSource: sources.some((source) => source.status !== 'published'),
});

export function suggestIntendedChange(input: {
  readonly material: Material;
  readonly amount: Kilograms;
  readonly area: SquareMetres;
  readonly texture: Texture | null;
  readonly depth: Inches | null;
  readonly freeLime?: boolean;
}): { ok: true; suggestions: readonly Suggestion[] } | { ok: false; reason: SuggestRefusal; sentence: string } {
  const { material, texture, depth } = input;
  const refuse = (reason: SuggestRefusal, sentence: string) => ({ ok: false, reason, sentence }) as const;
  const { S, CCE, K2O, P2O5 } = material.analysis;
  const nutrients =
    material.reaction === 'soluble-salt'
      ? ([
          ['K2O', K2O, 'potassium'],
          ['P2O5', P2O5, 'phosphorus'],
        ] as const)
      : [];
  const changesPh = material.reaction === 'sulfur' || material.reaction === 'lime';
  if (!changesPh && nutrients.every(([, figure]) => figure === undefined)) {
    return refuse(
      'no-published-rule',
      `No published rule says how far ${material.name} moves a soil test. Enter the change you mean yourself.`,
    );
  }
  if (depth === null || depth <= 0)
    return refuse('depth-missing', 'How deep it is worked in decides the change. Give the depth first.');
  const lb = (toPounds(input.amount) * 1000) / toSquareFeet(input.area);
  if (changesPh) {
    if (texture === null)
      return refuse(
        'texture-missing',
        'The same amount moves pH twice as far in light soil as in heavy. Set the texture of the plot first.',
      );
    if (material.reaction === 'sulfur' && input.freeLime === true) {
      return refuse(
        'free-lime',
        'This soil holds free lime, which uses sulfur up before pH can fall. No change can be promised.',
      );
    }
    const isSulfur = material.reaction === 'sulfur';
    const active = isSulfur ? (lb * (S?.percent ?? 0)) / 100 : (lb * (CCE?.percent ?? 0)) / LIMESTONE_CCE;
    const needs = (isSulfur ? SULFUR : LIMESTONE)[texture];
    const deep = TABLE_DEPTH_IN / depth;
    const change = range(
      'soil_ph_water',
      'pH',
      isSulfur ? -1 : 1,
      (active * deep) / needs.large,
      (active * deep) / needs.small,
      needs.sources,
    );
    return { ok: true, suggestions: [change] };
  }
  const slice = { densityGPerCm3: DENSITY, depthIn: depth };
  const suggestions = nutrients.flatMap(([oxide, figure, analyte]) => {
    if (figure === undefined) return [];
    const { small, large, element } = FOUND_AGAIN[oxide];
    const share = (figure.percent / 100) * element;
    return [
      range(analyte, 'mg/kg', 1, ppmGain(lb, share, small, slice), ppmGain(lb, share, large, slice), [TRI_STATE]),
    ];
  });
  return { ok: true, suggestions };
}
