import type { Plot } from '@/lib/schemas/plots';
import { dayText } from '@/lib/ui/site-plan/measure';
import { RestorePlot } from './archive-plot';

type ArchivedPlotsProps = {
  readonly siteId: string;
  readonly plots: readonly Plot[];
  readonly mayRestore: boolean;
  readonly onRestored: () => void;
};

export function ArchivedPlots({ siteId, plots, mayRestore, onRestored }: ArchivedPlotsProps) {
  return (
    <ul className="border-y border-horizon-5">
      {plots.map((plot) => (
        <li
          key={plot.id}
          className="flex flex-wrap items-center gap-x-6 gap-y-2 border-b border-horizon-5 py-2 last:border-0"
        >
          <p className="min-w-0 flex-1 basis-52 break-words">
            <span className="font-semibold">{plot.name}</span>
            <span className="text-clay">, archived {dayText((plot.archivedAt ?? '').slice(0, 10))}</span>
          </p>
          {mayRestore ? <RestorePlot siteId={siteId} plot={plot} onRestored={onRestored} /> : null}
        </li>
      ))}
    </ul>
  );
}
