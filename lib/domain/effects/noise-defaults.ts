import type { AnalyteKey } from '../analytes';

/**
 * Default noise of a reading by class of analyte, before a site has taught its own: sds on the working scale (pH units;
 * log-sds for the rest, used as they stand), each believed as if from 8 degrees of freedom (sd known to about 25 %).
 *
 * `core` core to core in the plot, `rep` the laboratory on the same bag, `wobble` short-lived change of this plot,
 * `occasion` the whole site that day, `season` and `laboratory` once per difference when the two tests differ in them.
 * `spread` is the true sd between plots of a site (prior worth 4 degrees of freedom).
 *
 * Anchors, published: Ferrari and Vermeulen, Neth J Agric Sci (analysis and sampling together 10 % for P, K, Mg and
 * 0.1 pH); Raun et al., Soil Sci Soc Am J 62:683-690, 1998 (pH of 490 one-foot squares); Miller and Czyryca,
 * ASA-CSSA-SSSA 2015 (between laboratories); northeastern US comparison of 14 soils in 7 laboratories; Gascho et al.,
 * Commun Soil Sci Plant Anal 27:773-782, 1996 (season). `basis` says which figures are derived from these and which are
 * our assumption; the published records are in fixtures/tables/error-model.json. None was measured on small,
 * intensively amended beds.
 */
export type NoiseClassKey =
  | 'ph-water'
  | 'ph-salt'
  | 'p'
  | 'k'
  | 'bases'
  | 'organic-matter'
  | 'micronutrient'
  | 'mobile';

export type NoiseClass = {
  readonly scale: 'additive' | 'log';
  readonly core: number;
  readonly rep: number;
  readonly wobble: number;
  readonly occasion: number;
  /** 'refuse': spring and fall of this analyte are never set side by side without untreated plots. */
  readonly season: number | 'refuse';
  readonly laboratory: number;
  readonly spread: number;
  readonly basis: string;
};

export const DEFAULT_DF = 8;
export const SPREAD_DF = 4;
const PH_SPREAD = 0.3;
const LOG_SPREAD = 0.35;

const log = (
  core: number,
  rep: number,
  wobble: number,
  occasion: number,
  season: number | 'refuse',
  laboratory: number,
) => ({ scale: 'log', core, rep, wobble, occasion, season, laboratory, spread: LOG_SPREAD }) as const;

export const NOISE_CLASSES: Readonly<Record<NoiseClassKey, NoiseClass>> = {
  'ph-water': {
    scale: 'additive',
    core: 0.25,
    rep: 0.06,
    wobble: 0.06,
    occasion: 0.08,
    season: 0.2,
    laboratory: 0.25,
    spread: PH_SPREAD,
    basis: 'core, season, laboratory derived; the rest assumed',
  },
  'ph-salt': {
    scale: 'additive',
    core: 0.25,
    rep: 0.05,
    wobble: 0.05,
    occasion: 0.05,
    season: 0.1,
    laboratory: 0.2,
    spread: PH_SPREAD,
    basis: 'core, season, laboratory derived; the rest assumed',
  },
  p: { ...log(0.4, 0.08, 0.06, 0.06, 0.12, 0.25), basis: 'laboratory derived; the rest assumed' },
  k: { ...log(0.3, 0.06, 0.06, 0.07, 0.15, 0.22), basis: 'season, laboratory derived; the rest assumed' },
  bases: { ...log(0.2, 0.05, 0.05, 0.05, 0.07, 0.15), basis: 'assumed' },
  'organic-matter': { ...log(0.15, 0.05, 0.03, 0.04, 0.05, 0.24), basis: 'laboratory derived; the rest assumed' },
  micronutrient: { ...log(0.4, 0.1, 0.06, 0.08, 0.15, 0.5), basis: 'laboratory derived; the rest assumed' },
  mobile: { ...log(0.5, 0.12, 0.15, 0.2, 'refuse', 0.35), basis: 'assumed' },
};

const CLASS_OF: Partial<Readonly<Record<AnalyteKey, NoiseClassKey>>> = {
  soil_ph_water: 'ph-water',
  soil_ph_salt: 'ph-salt',
  buffer_ph: 'ph-salt',
  phosphorus: 'p',
  potassium: 'k',
  sodium: 'k',
  calcium: 'bases',
  magnesium: 'bases',
  cec: 'bases',
  organic_matter: 'organic-matter',
  zinc: 'micronutrient',
  copper: 'micronutrient',
  manganese: 'micronutrient',
  iron: 'micronutrient',
  boron: 'micronutrient',
  sulfur: 'mobile',
  nitrate_n: 'mobile',
};

/** The class whose noise is used, or a refusal: for the other analytes no noise figure was found, so none is made up. */
export function noiseClassOf(
  analyte: AnalyteKey,
): { ok: true; key: NoiseClassKey; noise: NoiseClass } | { ok: false; reason: 'no-noise-figure' } {
  const key = CLASS_OF[analyte];
  return key === undefined ? { ok: false, reason: 'no-noise-figure' } : { ok: true, key, noise: NOISE_CLASSES[key] };
}
