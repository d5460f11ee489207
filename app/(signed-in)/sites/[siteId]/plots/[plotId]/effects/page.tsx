import type { Metadata } from 'next';
import { orNotFound } from '@/app/_server/context';
import { can } from '@/lib/access/table';
import { getEffects } from '@/lib/data/effects/getEffects';
import { getHistory } from '@/lib/data/history/getHistory';
import { openPlot, type PlotParams } from '../_server/open-plot';
import { PlotEffects } from './_components/plot-effects';

export const metadata: Metadata = { title: 'Effects' };

export default async function PlotEffectsPage({ params }: PlotParams) {
  const { siteId, plotId } = await params;
  const { ctx, site } = await openPlot(siteId, plotId);
  const [effects, history] = await Promise.all([
    orNotFound(getEffects({ ctx, input: { siteId, plotId } })),
    orNotFound(getHistory({ ctx, input: { siteId, plotId } })),
  ]);
  return <PlotEffects siteId={siteId} first={effects} history={history} mayRecord={can(site.role, 'record.add')} />;
}
