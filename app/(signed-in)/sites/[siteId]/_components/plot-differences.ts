import type { TargetList } from '@/lib/schemas/targets';
import { changedFields, PLOT_FIELDS, type PlotField, type PlotValues } from './plot-values';
import { targetOptions } from './target-options';
import type { Difference } from './version-conflict';

/** Fields that both changed, and not to the same: only there must somebody choose. */
export function plotDifferences(
  mine: PlotValues,
  before: PlotValues,
  theirs: PlotValues,
  targets: TargetList,
): Difference[] {
  const names = new Map(targetOptions(targets).map((option) => [option.value, option.label]));
  const said = (field: PlotField, value: string): string => {
    if (field === 'established') return value === 'no' ? 'new ground' : 'worked for years';
    if (field === 'freeLimeSeen') return value === 'on' ? 'yes' : 'no';
    if (field === 'targetSetKey' || field === 'cropSetKey') return names.get(value) ?? value;
    return value;
  };
  return changedFields(mine, before)
    .filter((field) => theirs[field].trim() !== before[field].trim() && mine[field].trim() !== theirs[field].trim())
    .map((field) => ({
      field: PLOT_FIELDS[field],
      yours: said(field, mine[field]),
      theirs: said(field, theirs[field]),
    }));
}
