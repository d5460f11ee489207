import type { Metadata } from 'next';
import { EmptyState } from '@/lib/ui/feedback/empty-state';
import { Layers, Stretch } from '@/lib/ui/frame/layers';
import type { PlotParams, Search } from '../_server/open-plot';
import { askedOf } from './_components/choice';
import { Chooser } from './_components/chooser';
import { Compared } from './_components/compared';
import { loadComparison } from './_server/load-comparison';

export const metadata: Metadata = { title: 'Compare' };

export default async function ComparePage({ params, searchParams }: PlotParams & { searchParams: Search }) {
  const { siteId, plotId } = await params;
  const view = await loadComparison(siteId, plotId, askedOf(await searchParams));
  if (view === null) {
    return (
      <Stretch>
        <EmptyState shape="chart" title="Nothing to compare yet">
          Two confirmed tests stand here side by side, with their difference and how much of it may be noise. The first
          comes with the first confirmed report of this plot.
        </EmptyState>
      </Stretch>
    );
  }
  return (
    <>
      <Stretch>
        <Chooser
          plotId={plotId}
          analytes={view.analytes}
          analyte={view.analyte.key}
          tests={view.tests}
          presets={view.presets}
          choice={view.choice}
          replaced={view.replaced}
        />
      </Stretch>
      {view.answer === null ? (
        <Stretch ground="white">
          <EmptyState shape="chart" title={`One test of ${view.analyte.label} so far`}>
            A second one, of this plot or of another, taken the same way, gives a difference.
          </EmptyState>
        </Stretch>
      ) : (
        <Layers>
          <Compared answer={view.answer} siteId={siteId} hemisphere={view.hemisphere} />
        </Layers>
      )}
    </>
  );
}
