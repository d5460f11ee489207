import { orNotFound } from '@/app/_server/context';
import { can } from '@/lib/access/table';
import { getHistory } from '@/lib/data/history/getHistory';
import { PlotHistory } from './_components/plot-history';
import { openPlot, type PlotParams } from './_server/open-plot';

export default async function HistoryPage({ params }: PlotParams) {
  const { siteId, plotId } = await params;
  const { ctx, site } = await openPlot(siteId, plotId);
  const first = await orNotFound(getHistory({ ctx, input: { siteId, plotId } }));
  return (
    <PlotHistory
      siteId={siteId}
      siteName={site.name}
      first={first}
      mayUpload={can(site.role, 'reading.work')}
      mayRecord={can(site.role, 'record.add')}
    />
  );
}
