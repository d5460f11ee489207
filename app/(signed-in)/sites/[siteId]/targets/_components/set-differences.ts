import type { OwnTargetSet } from '@/lib/schemas/targets';
import type { Difference } from '../../_components/version-conflict';
import { readBands } from './band-values';
import { analyteLabel, bandText, methodText } from './band-words';

/** What a form holds beside what somebody else saved meanwhile, band by band. */
export function setDifferences(
  mine: Readonly<Record<string, string>>,
  rows: readonly number[],
  theirs: OwnTargetSet,
): Difference[] {
  const read = readBands(mine, rows);
  const words = (band: { low: string; high: string; unit: string | null; method: string | null; analyte: string }) =>
    `${bandText(band)}, ${methodText(band)}`;
  const yours = new Map(
    (read.ok ? read.bands : []).map((band) => [
      band.analyte,
      words({ ...band, low: String(band.low), high: String(band.high) }),
    ]),
  );
  const others = new Map(theirs.bands.map((band) => [band.analyte, words(band)]));
  const analytes = [...new Set([...yours.keys(), ...others.keys()])];
  return [
    { field: 'Name', yours: (mine.name ?? '').trim(), theirs: theirs.name },
    ...analytes.map((key) => ({
      field: analyteLabel(key),
      yours: yours.get(key) ?? '',
      theirs: others.get(key) ?? '',
    })),
  ].filter((one) => one.yours !== one.theirs);
}
