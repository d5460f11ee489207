import type { Plot } from '@/lib/schemas/plots';
import type { Option } from '@/lib/ui/fields/select-field';

/** The plot the file was dropped on first, then by the newest test, then by name. */
export function plotOptions(plots: readonly Plot[], droppedOn: string | null): Option[] {
  const newest = (plot: Plot) => plot.lastTest?.takenOn ?? '';
  return [...plots]
    .sort(
      (a, b) =>
        Number(b.id === droppedOn) - Number(a.id === droppedOn) ||
        newest(b).localeCompare(newest(a)) ||
        a.name.localeCompare(b.name, 'en', { numeric: true }),
    )
    .map((plot) => ({ value: plot.id, label: plot.archivedAt ? `${plot.name} (archived)` : plot.name }));
}
