import type { AnalyteKey } from '../analytes';
import { citation, type Source } from '../sources';

/**
 * The target sets that come with the program: published bands only, so they are short. A crop without a published band of
 * its own (exhibition onion, leek) has none here; its grower takes the vegetable band or enters their own. A set is never
 * edited in place: a changed band gets a new key.
 */
export type TargetBand = {
  readonly analyte: AnalyteKey;
  /** In `unit`; null = open on that side. */
  readonly low: number | null;
  readonly high: number | null;
  readonly unit: string;
  /** Method the band holds for; null = any method of that analyte. */
  readonly method: string | null;
  readonly source: Source;
};

export type TargetSet = {
  readonly key: string;
  readonly name: string;
  readonly bands: readonly TargetBand[];
  /** What was looked for and not found. */
  readonly gaps: string;
};

const ph = (low: number, high: number, source: Source): TargetBand => ({
  analyte: 'soil_ph_water',
  low,
  high,
  unit: 'pH',
  method: null,
  source,
});

export const TARGET_SETS: readonly TargetSet[] = [
  {
    key: 'vegetables-1',
    name: 'Vegetables',
    bands: [
      ph(6.0, 6.5, {
        publisher: 'N.C. Department of Agriculture & Consumer Services',
        title: 'Soil Testing: Understand Your Report - Homeowners',
        status: 'published',
      }),
    ],
    gaps: 'Nutrient bands depend on the extractant and are not part of this set. No band of their own was found for exhibition onions and leeks.',
  },
  {
    key: 'pumpkin-and-squash-1',
    name: 'Pumpkin, squash and marrow',
    bands: [
      ph(6.0, 6.8, {
        publisher: 'UMass Extension',
        title: 'Pumpkins and Squash - growing tips',
        status: 'published',
      }),
    ],
    gaps: 'Found for pumpkin and squash; taken for marrow as the same species. No nutrient bands for exhibition growing were found.',
  },
];

export function targetSet(key: string): { ok: true; set: TargetSet } | { ok: false; reason: 'no-such-set' } {
  const set = TARGET_SETS.find((entry) => entry.key === key);
  return set === undefined ? { ok: false, reason: 'no-such-set' } : { ok: true, set };
}

export const sourceOfSet = (set: TargetSet): string =>
  [...new Set(set.bands.map((band) => citation(band.source)))].join('; ');
