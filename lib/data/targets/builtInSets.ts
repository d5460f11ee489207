import { sourceOfSet, TARGET_SETS } from '@/lib/domain/targets';
import type { TargetList } from '@/lib/schemas/targets';

const decimal = (value: number | null) => (value === null ? null : String(value));

/** The published sets that come with the program. */
export const builtInSets = (): TargetList['builtIn'] =>
  TARGET_SETS.map((set) => ({
    key: set.key,
    name: set.name,
    source: sourceOfSet(set),
    gaps: set.gaps,
    bands: set.bands.map((band) => ({
      analyte: band.analyte,
      low: decimal(band.low),
      high: decimal(band.high),
      unit: band.unit,
      method: band.method,
    })),
  }));
