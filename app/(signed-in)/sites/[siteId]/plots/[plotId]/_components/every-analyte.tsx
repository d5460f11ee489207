import type { HistoryAnswer } from '@/lib/schemas/history';
import { SmallMultiples } from '@/lib/ui/charts/small-multiples';
import { driftAmendments, firstDay, miniSeries } from './history-props';

const MOST = 12;

/** Small charts in the fixed order of the analytes; more than twelve at once cannot be taken in, so the rest is folded. */
export function EveryAnalyte({ history, siteId }: { history: HistoryAnswer; siteId: string }) {
  const all = miniSeries(history, siteId);
  const shared = {
    title: `Every analyte of ${history.plot.name}`,
    amendments: driftAmendments(history),
    from: firstDay(history),
    asOf: history.today,
  };
  const rest = all.slice(MOST);
  return (
    <div className="grid gap-6">
      <SmallMultiples {...shared} series={all.slice(0, MOST)} />
      {rest.length > 0 ? (
        <details>
          <summary className="text-link min-h-(--target) py-2 font-semibold print:hidden">
            Show {rest.length} more {rest.length === 1 ? 'analyte' : 'analytes'}
          </summary>
          <div className="pt-4">
            <SmallMultiples {...shared} title={`Further analytes of ${history.plot.name}`} series={rest} />
          </div>
        </details>
      ) : null}
    </div>
  );
}
